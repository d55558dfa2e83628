import { Component } from '@angular/core';
import { TestBed } from '@angular/core/testing';
import { provideRouter, Router, RouterOutlet } from '@angular/router';
import { HeadingFocus } from './heading-focus';

@Component({ selector: 'app-first', template: '<h1>First</h1>' })
class First {}

@Component({ selector: 'app-second', template: '<h1>Second</h1>' })
class Second {}

@Component({ template: '<main tabindex="-1"><router-outlet /></main>', imports: [RouterOutlet] })
class Page {}

describe('the focus after navigation', () => {
  it('goes to the heading of a new page, but not on the first page or for a changed filter', async () => {
    TestBed.configureTestingModule({
      providers: [
        provideRouter([
          { path: 'first', component: First },
          { path: 'second', component: Second },
        ]),
      ],
    });
    TestBed.inject(HeadingFocus);
    const fixture = TestBed.createComponent(Page);
    const go = async (url: string): Promise<string | null> => {
      await TestBed.inject(Router).navigateByUrl(url);
      await fixture.whenStable();
      return document.activeElement?.tagName === 'H1' ? document.activeElement.textContent : null;
    };
    document.body.append(fixture.nativeElement as HTMLElement);

    expect(await go('/first')).toBeNull();
    expect(await go('/second')).toBe('Second');
    (document.activeElement as HTMLElement).blur();
    expect(await go('/second?days=7')).toBeNull();
  });
});
