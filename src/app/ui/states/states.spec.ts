import type { Type } from '@angular/core';
import { TestBed, type ComponentFixture } from '@angular/core/testing';
import { EmptyState } from './empty-state';
import { ErrorState } from './error-state';
import { LoadingLines } from './loading-lines';
import { ProblemText } from './problem-text';

async function shown<T>(part: Type<T>, inputs: Record<string, unknown>): Promise<ComponentFixture<T>> {
  const fixture = TestBed.createComponent(part);
  Object.entries(inputs).forEach(([name, value]) => fixture.componentRef.setInput(name, value));
  await fixture.whenStable();
  return fixture;
}

const host = (fixture: ComponentFixture<unknown>): HTMLElement => fixture.nativeElement as HTMLElement;

describe('an empty screen', () => {
  it('says what belongs there under a heading', async () => {
    const fixture = await shown(EmptyState, {
      icon: 'shelves',
      title: 'No shelves yet',
      text: 'Draw the first rack.',
    });
    expect(host(fixture).querySelector('h2')?.textContent).toBe('No shelves yet');
    expect(host(fixture).querySelector('p')?.textContent).toBe('Draw the first rack.');
  });
});

describe('a failed fetch', () => {
  it('is an alert with its message, and asks again when told to', async () => {
    const fixture = await shown(ErrorState, { message: 'The server did not answer.' });
    let asked = 0;
    fixture.componentInstance.retried.subscribe(() => (asked += 1));
    expect(host(fixture).querySelector('[role=alert]')?.textContent).toContain('The server did not answer.');
    host(fixture).querySelector('button')?.click();
    expect(asked).toBe(1);
  });
});

describe('a wait', () => {
  it('is a status that names what is awaited and holds the place of so many lines', async () => {
    const fixture = await shown(LoadingLines, { label: 'Loading the shelves', lines: 4 });
    expect(host(fixture).getAttribute('role')).toBe('status');
    expect(host(fixture).textContent?.trim()).toBe('Loading the shelves');
    expect(host(fixture).querySelectorAll('i')).toHaveLength(4);
  });
});

describe('a problem', () => {
  it('appears inside an alert that was there before it', async () => {
    const fixture = await shown(ProblemText, { message: null });
    expect(host(fixture).getAttribute('role')).toBe('alert');
    expect(host(fixture).textContent?.trim()).toBe('');
    fixture.componentRef.setInput('message', 'The name is taken.');
    await fixture.whenStable();
    expect(host(fixture).querySelector('p')?.textContent).toContain('The name is taken.');
  });
});
