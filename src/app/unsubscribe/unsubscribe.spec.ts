import { provideHttpClient } from '@angular/common/http';
import { HttpTestingController, provideHttpClientTesting } from '@angular/common/http/testing';
import { TestBed, type ComponentFixture } from '@angular/core/testing';
import { provideRouter } from '@angular/router';
import { account } from '../core/testing/account-builder';
import { Unsubscribe } from './unsubscribe';

describe('the page of a mail’s link', () => {
  let fixture: ComponentFixture<Unsubscribe>;
  let server: HttpTestingController;
  const address = '/api/v1/unsubscribe/token';
  const link = { roomName: 'Loft', stops: 'letter' as const, isStopped: false };
  const text = (): string => (fixture.nativeElement as HTMLElement).textContent;

  beforeEach(() => {
    TestBed.configureTestingModule({
      providers: [provideHttpClient(), provideHttpClientTesting(), provideRouter([])],
    });
    server = TestBed.inject(HttpTestingController);
    fixture = TestBed.createComponent(Unsubscribe);
    fixture.componentRef.setInput('token', 'token');
    fixture.detectChanges();
  });
  afterEach(() => server.verify());

  it('asks before it stops anything, and proves the write where somebody is signed in', async () => {
    server.expectOne(address).flush(link);
    await fixture.whenStable();
    expect(text()).toContain('Shall Loft stop sending you the morning letter?');

    (fixture.nativeElement as HTMLElement).querySelector('button')?.click();
    server.expectOne('/api/v1/account').flush(account());
    const request = server.expectOne(address);
    expect([request.request.method, request.request.headers.get('X-CSRF-Token')]).toEqual([
      'POST',
      'token-1',
    ]);
    request.flush({ ...link, isStopped: true });
    await fixture.whenStable();
    expect(text()).toContain('Loft no longer sends you the morning letter.');
  });

  it('stops for who is not signed in', async () => {
    server.expectOne(address).flush(link);
    await fixture.whenStable();
    (fixture.nativeElement as HTMLElement).querySelector('button')?.click();
    server.expectOne('/api/v1/account').flush(null, { status: 401, statusText: 'x' });
    server.expectOne(address).flush({ ...link, isStopped: true });
    await fixture.whenStable();
    expect(text()).toContain('no longer');
  });

  it('says that nothing was changed when the link is not ours', async () => {
    server.expectOne(address).flush(null, { status: 404, statusText: 'x' });
    await fixture.whenStable();
    expect(text()).toContain('not one of ours');
  });
});
