import { TestBed } from '@angular/core/testing';
import { Explained } from './explained';

describe('a word of the trade', () => {
  it('tells its meaning when it is asked for, and hides it again', async () => {
    const fixture = TestBed.createComponent(Explained);
    fixture.componentRef.setInput('word', 'T50');
    fixture.componentRef.setInput('meaning', 'The day by which half were up.');
    await fixture.whenStable();
    const host = fixture.nativeElement as HTMLElement;
    const button = host.querySelector('button')!;
    const meaning = host.querySelector<HTMLElement>(`#${button.getAttribute('aria-controls')}`)!;
    expect(meaning.hidden).toBe(true);
    button.click();
    await fixture.whenStable();
    expect(button.getAttribute('aria-expanded')).toBe('true');
    expect(meaning.hidden).toBe(false);
    expect(meaning.textContent).toBe('The day by which half were up.');
    button.click();
    await fixture.whenStable();
    expect(meaning.hidden).toBe(true);
  });
});
