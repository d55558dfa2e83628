import { TestBed } from '@angular/core/testing';
import { CautionLine } from './caution-line';

async function line(hazard: string): Promise<HTMLElement> {
  const fixture = TestBed.createComponent(CautionLine);
  fixture.componentRef.setInput('hazard', hazard);
  await fixture.whenStable();
  return fixture.nativeElement as HTMLElement;
}

describe('a caution line', () => {
  it.each([
    ['water-near-mains', 'residual-current device'],
    ['heat-mat', 'thermostat'],
    ['lamp', 'do not look into the LEDs'],
    ['broken-tube', 'mercury'],
    ['mould', 'mask'],
    ['feed', 'label'],
    ['plant-protection', 'local rules'],
    ['lifting', 'both hands'],
    ['eating', 'edible'],
    ['seed', 'not food'],
  ])('for %s is a note that calls itself usual and speaks of "%s"', async (hazard, words) => {
    const host = await line(hazard);
    expect(host.getAttribute('role')).toBe('note');
    expect(host.textContent).toContain('Usual caution. ');
    expect(host.textContent).toContain(words);
  });
});
