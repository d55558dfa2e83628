import { Component } from '@angular/core';
import { TestBed } from '@angular/core/testing';
import { provideRouter } from '@angular/router';
import { RouterTestingHarness } from '@angular/router/testing';
import { CareFrame } from './care-frame';

@Component({ template: '<h1>A page</h1>' })
class Page {}

describe('the frame of care', () => {
  it.each([
    ['/care', 'Today'],
    ['/care/record', 'Record'],
  ])('at %s says that one is at %s', async (address, place) => {
    const children = ['', 'rota', 'record'].map((path) => ({ path, component: Page }));
    TestBed.configureTestingModule({
      providers: [provideRouter([{ path: 'care', component: CareFrame, children }])],
    });
    const harness = await RouterTestingHarness.create(address);
    await harness.fixture.whenStable();
    const element = harness.fixture.nativeElement as HTMLElement;
    const current = [...element.querySelectorAll('nav [aria-current=page]')];
    expect(current.map((link) => link.textContent.trim())).toEqual([place]);
    expect(element.querySelectorAll('nav a')).toHaveLength(3);
  });
});
