import { Component } from '@angular/core';
import { TestBed } from '@angular/core/testing';
import { Title } from '@angular/platform-browser';
import { provideRouter, TitleStrategy } from '@angular/router';
import { RouterTestingHarness } from '@angular/router/testing';
import { PageTitle } from './page-title';

@Component({ template: '' })
class Blank {}

describe('the document title', () => {
  beforeEach(() => {
    TestBed.configureTestingModule({
      providers: [
        provideRouter([
          { path: 'alerts', title: 'Alerts', component: Blank },
          { path: 'untitled', component: Blank },
        ]),
        { provide: TitleStrategy, useExisting: PageTitle },
      ],
    });
  });

  it('of a titled route names the page first, then the application', async () => {
    await RouterTestingHarness.create('/alerts');
    expect(TestBed.inject(Title).getTitle()).toBe('Alerts – Lampmeadow');
  });

  it('of a route without a title is the application alone', async () => {
    await RouterTestingHarness.create('/untitled');
    expect(TestBed.inject(Title).getTitle()).toBe('Lampmeadow');
  });
});
