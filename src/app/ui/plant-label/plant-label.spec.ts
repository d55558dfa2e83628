import { TestBed } from '@angular/core/testing';
import { provideRouter } from '@angular/router';
import { PlantLabel } from './plant-label';

async function label(inputs: Record<string, unknown>): Promise<HTMLElement> {
  TestBed.configureTestingModule({ providers: [provideRouter([])] });
  const fixture = TestBed.createComponent(PlantLabel);
  Object.entries(inputs).forEach(([name, value]) => fixture.componentRef.setInput(name, value));
  await fixture.whenStable();
  return fixture.nativeElement as HTMLElement;
}

describe('a plant label', () => {
  it('reads crop, variety and note as one line of words', async () => {
    const host = await label({ crop: 'Leek', variety: 'Winter Piper', note: 'sown 21 Nov' });
    expect(host.textContent?.trim()).toBe('Leek Winter Piper sown 21 Nov');
    expect(host.querySelector('a')).toBeNull();
  });

  it('of a crop alone leaves nothing empty beside it', async () => {
    expect((await label({ crop: 'Bay' })).textContent?.trim()).toBe('Bay');
  });

  it('with somewhere to lead is a link named by its words', async () => {
    const link = (await label({ crop: 'Leek', note: 'day 10', link: ['/plantings', 7] })).querySelector('a');
    expect(link?.getAttribute('href')).toBe('/plantings/7');
    expect(link?.textContent?.trim()).toBe('Leek day 10');
  });
});
