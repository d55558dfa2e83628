import { provideHttpClient } from '@angular/common/http';
import { HttpTestingController, provideHttpClientTesting } from '@angular/common/http/testing';
import { TestBed } from '@angular/core/testing';
import { provideRouter, Router } from '@angular/router';
import { account } from '../core/testing/account-builder';
import { Unreachable } from './unreachable';

describe('the page in place of one that cannot be shown', () => {
  it('asks again when told to, and goes on once the server answers', async () => {
    TestBed.configureTestingModule({
      providers: [
        provideHttpClient(),
        provideHttpClientTesting(),
        provideRouter([{ path: '**', children: [] }]),
      ],
    });
    const fixture = TestBed.createComponent(Unreachable);
    fixture.componentRef.setInput('to', '/alerts');
    await fixture.whenStable();
    const page = fixture.nativeElement as HTMLElement;
    const server = TestBed.inject(HttpTestingController);

    page.querySelector('button')?.click();
    server.expectOne('/api/v1/account').flush(null, { status: 503, statusText: 'x' });
    await fixture.whenStable();
    expect(page.querySelector('[role=alert]')?.textContent).toContain('can’t be reached');
    expect(TestBed.inject(Router).url).toBe('/');

    page.querySelector('button')?.click();
    server.expectOne('/api/v1/account').flush(account());
    await fixture.whenStable();
    expect(TestBed.inject(Router).url).toBe('/alerts');
  });

  it.each([
    ['nobody', null, false],
    ['somebody', JSON.stringify(account()), true],
    ['what nobody can read', '{', false],
  ])('on a device that knows %s leads to care accordingly', async (_who, kept, leads) => {
    localStorage.clear();
    if (kept !== null) localStorage.setItem('lampmeadow.account', kept);
    TestBed.configureTestingModule({ providers: [provideHttpClient(), provideRouter([])] });
    const fixture = TestBed.createComponent(Unreachable);
    await fixture.whenStable();
    const page = fixture.nativeElement as HTMLElement;
    expect(page.querySelector('a[href="/care"]') !== null).toBe(leads);
    localStorage.clear();
  });
});
