import { TestBed } from '@angular/core/testing';
import { NoteLine } from './note-line';

describe('a note line', () => {
  it('says its sentence in its tone, with an icon that is not read out', async () => {
    const fixture = TestBed.createComponent(NoteLine);
    fixture.componentRef.setInput('tone', 'ember');
    fixture.componentRef.setInput('icon', 'arrow_upward');
    fixture.componentRef.setInput('text', 'Too warm since 13:54.');
    await fixture.whenStable();
    const host = fixture.nativeElement as HTMLElement;
    expect(host.className).toBe('ember');
    expect(host.querySelector('span')?.textContent).toBe('Too warm since 13:54.');
    const icon = host.querySelector('mat-icon');
    expect(icon?.textContent).toBe('arrow_upward');
    expect(icon?.getAttribute('aria-hidden')).toBe('true');
  });
});
