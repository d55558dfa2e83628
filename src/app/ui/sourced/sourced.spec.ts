import { TestbedHarnessEnvironment } from '@angular/cdk/testing/testbed';
import { TestBed } from '@angular/core/testing';
import { MatIconHarness } from '@angular/material/icon/testing';
import { COMMON_PRACTICE, FROM_MEMORY } from '@shared/growing/crops/figure';
import { sourceWords } from './source-words';
import { Sourced } from './sourced';

describe('a figure with its source', () => {
  it('shows the source once it is asked for', async () => {
    const fixture = TestBed.createComponent(Sourced);
    fixture.componentRef.setInput('figure', '18–21 °C');
    fixture.componentRef.setInput('source', 'Extension table');
    await fixture.whenStable();
    const page = fixture.nativeElement as HTMLElement;
    const [button, note] = [page.querySelector('button'), page.querySelector<HTMLElement>('[role=note]')];
    expect(button?.getAttribute('aria-label')).toBe('Who says 18–21 °C?');
    expect(note?.hidden).toBe(true);
    button?.click();
    await fixture.whenStable();
    expect(note?.hidden).toBe(false);
    expect(note?.textContent).toBe('Source: Extension table.');
    expect(button?.getAttribute('aria-controls')).toBe(note?.id);
    const icons = await TestbedHarnessEnvironment.loader(fixture).getAllHarnesses(MatIconHarness);
    expect(icons).toHaveLength(1);
  });

  it('that nobody published says so', () => {
    expect(sourceWords(COMMON_PRACTICE)).toMatch(/no published source/);
    expect(sourceWords(FROM_MEMORY)).toMatch(/could not be looked up/);
    expect(sourceWords('Harrington (1962).')).toBe('Source: Harrington (1962).');
  });
});
