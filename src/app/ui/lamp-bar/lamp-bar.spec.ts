import { TestBed } from '@angular/core/testing';
import { LampBar } from './lamp-bar';

describe('a lamp bar', () => {
  it.each([
    [true, 'lit'],
    [false, ''],
    [null, 'unknown'],
  ])('of a lamp whose light is %s looks "%s" and is not read out', async (lit, look) => {
    const fixture = TestBed.createComponent(LampBar);
    fixture.componentRef.setInput('lit', lit);
    await fixture.whenStable();
    const host = fixture.nativeElement as HTMLElement;
    expect(host.className).toBe(look);
    expect(host.getAttribute('aria-hidden')).toBe('true');
  });
});
