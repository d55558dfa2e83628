import { TestbedHarnessEnvironment } from '@angular/cdk/testing/testbed';
import type { HarnessLoader } from '@angular/cdk/testing';
import type { HttpTestingController, TestRequest } from '@angular/common/http/testing';
import { Component, signal } from '@angular/core';
import { TestBed, type ComponentFixture } from '@angular/core/testing';
import { MatButtonHarness } from '@angular/material/button/testing';
import { MATERIAL_ANIMATIONS } from '@angular/material/core';
import { MatInputHarness } from '@angular/material/input/testing';
import { MatMenuHarness } from '@angular/material/menu/testing';
import { MatSnackBarHarness } from '@angular/material/snack-bar/testing';
import type { Alert } from '@shared/contracts/alerts';
import type { Role } from '@shared/contracts/people';
import { AlertInbox } from '../../core/alert-inbox';
import { account, membership } from '../../core/testing/account-builder';
import { alert, inventedId } from '../../core/testing/board-builder';
import { providePlayedServer, signedInAs } from '../../core/testing/signed-in';
import { AlertCard } from '../alert-card/alert-card';

@Component({
  template: '<app-alert-card [alert]="alert()" (changed)="alert.set($event)" />',
  imports: [AlertCard],
})
class Host {
  readonly alert = signal(alert());
}

const address = `/api/v1/rooms/${membership().roomId}/alerts/${alert().id}`;
const seen = {
  acknowledgedAt: '2026-12-01T14:20:00Z',
  acknowledgedById: account().id,
  acknowledgedByName: account().name,
};
const quiet = { until: '2026-12-01T15:20:00Z', setAt: '2026-12-01T14:20:00Z', setByName: 'Jo Ashdown' };
const deed = {
  id: inventedId(950),
  at: '2026-12-01T14:20:00Z',
  personId: account().id,
  personName: account().name,
  text: 'Lamp raised',
};

describe('what somebody can do about an alert', () => {
  let server: HttpTestingController;
  let fixture: ComponentFixture<Host>;
  let loader: HarnessLoader;
  const page = (): HTMLElement => fixture.nativeElement as HTMLElement;
  const text = (): string => (page().textContent ?? '').replace(/[\s\u00a0]+/g, ' ');

  async function shown(changes: Partial<Alert> = {}, role: Role = 'helper'): Promise<void> {
    TestBed.configureTestingModule({
      providers: [
        ...providePlayedServer(),
        { provide: MATERIAL_ANIMATIONS, useValue: { animationsDisabled: true } },
      ],
    });
    server = signedInAs(account({ memberships: [membership({ role })] }));
    TestBed.inject(AlertInbox).hold([alert(changes)]);
    fixture = TestBed.createComponent(Host);
    fixture.componentInstance.alert.set(alert(changes));
    loader = TestbedHarnessEnvironment.documentRootLoader(fixture);
    await fixture.whenStable();
  }
  const press = async (name: RegExp | string): Promise<void> =>
    (await loader.getHarness(MatButtonHarness.with({ text: name }))).click();
  /** The one request, answered with the alert as it is then. */
  const answered = async (method: string, path: string, changes: Partial<Alert>): Promise<TestRequest> => {
    const request = server.expectOne({ method, url: `${address}/${path}` });
    request.flush(alert(changes));
    await fixture.whenStable();
    return request;
  };
  const undo = async (): Promise<void> => (await loader.getHarness(MatSnackBarHarness)).dismissWithAction();

  it('is to acknowledge with one tap, and to take it back', async () => {
    await shown();
    await press('Acknowledge');
    const request = await answered('POST', 'acknowledgement', seen);
    expect(request.request.body).toEqual({ note: '' });
    expect(text()).toContain('Seen by Maren Oxley, 14:20');
    expect(TestBed.inject(AlertInbox).unseenCount()).toBe(0);
    await undo();
    await answered('DELETE', 'acknowledgement', {});
    expect(text()).not.toContain('Seen by');
    expect(TestBed.inject(AlertInbox).unseenCount()).toBe(1);
  });

  it('is to acknowledge with a note', async () => {
    await shown();
    await press(/With a note/);
    await (await loader.getHarness(MatInputHarness)).setValue(' Vent opened ');
    await press('I have seen it');
    const request = await answered('POST', 'acknowledgement', { ...seen, acknowledgeNote: 'Vent opened' });
    expect(request.request.body).toEqual({ note: 'Vent opened' });
    expect(text()).toContain('“Vent opened”');
    expect(await loader.getAllHarnesses(MatInputHarness)).toEqual([]);
  });

  it('is to let it be quiet with a tap, and to end that', async () => {
    await shown();
    await press(/Quiet until/);
    await press(/For an hour/);
    const request = await answered('PUT', 'quiet', { quiet });
    expect(request.request.body).toEqual({ until: '2026-12-01T15:20:00.000Z' });
    expect(text()).toContain(
      'Quiet until 15:20, set by Jo Ashdown. Nobody is written to about it until then.',
    );
    page().querySelector<HTMLElement>('[aria-label="End the quiet"]')?.click();
    await answered('DELETE', 'quiet', {});
    expect(text()).not.toContain('set by Jo Ashdown');
  });

  it('takes any other time of the room’s clock within a week', async () => {
    await shown();
    await press(/Quiet until/);
    const field = await loader.getHarness(MatInputHarness);
    for (const [value, problem] of [
      ['', 'Give a day and a time.'],
      ['2026-12-01T14:00', 'That time is over already.'],
      ['2026-12-09T14:00', 'A week is the longest.'],
    ] as const) {
      await field.setValue(value);
      await press('Quiet until this time');
      expect(text()).toContain(problem);
    }
    await field.setValue('2026-12-03T09:30');
    await press('Quiet until this time');
    const request = await answered('PUT', 'quiet', { quiet });
    expect(request.request.body).toEqual({ until: '2026-12-03T09:30:00.000Z' });
  });

  it('says nothing of a quiet that has run out', async () => {
    await shown({ quiet: { ...quiet, until: '2026-12-01T14:19:00Z' } });
    expect(text()).not.toContain('set by Jo Ashdown');
  });

  it('is to note what was done, and to remove that', async () => {
    await shown();
    await press(/What was done/);
    await press('Note it');
    expect(text()).toContain('Write a few words first.');
    await (await loader.getHarness(MatInputHarness)).setValue('Lamp raised');
    await press('Note it');
    const request = await answered('POST', 'deeds', { deeds: [deed] });
    expect(request.request.body).toEqual({ text: 'Lamp raised' });
    expect(text()).toContain('Lamp raisedMaren Oxley, 14:20');
    await undo();
    await answered('DELETE', `deeds/${deed.id}`, {});
    expect(text()).not.toContain('Lamp raisedMaren');
  });

  it('keeps what was written while it can’t be stored, and sends it again as the same', async () => {
    await shown();
    await press(/What was done/);
    const field = await loader.getHarness(MatInputHarness);
    await field.setValue('Lamp raised');
    await press('Note it');
    const first = server.expectOne(`${address}/deeds`);
    first.flush(null, { status: 503, statusText: 'x' });
    await fixture.whenStable();
    expect(await field.getValue()).toBe('Lamp raised');
    await press('Note it');
    const second = await answered('POST', 'deeds', { deeds: [deed] });
    const keyOf = ({ request }: TestRequest): string | null => request.headers.get('Idempotency-Key');
    expect(keyOf(second)).toBe(keyOf(first));
  });

  it('is to say who looks after it', async () => {
    await shown();
    // Not by its harness, which would wait for the members.
    [...page().querySelectorAll('button')]
      .find(({ textContent }) => textContent?.includes('Assign'))
      ?.click();
    TestBed.tick();
    const members = [
      { personId: inventedId(171), name: 'Jo Ashdown', role: 'helper' },
      { personId: inventedId(172), name: 'Vi Ewer', role: 'viewer' },
      { personId: account().id, name: 'Maren Oxley', role: 'keeper' },
    ];
    server.expectOne(({ url }) => url.endsWith('/members')).flush(members);
    await fixture.whenStable();
    const menu = await loader.getHarness(MatMenuHarness);
    const items = await menu.getItems();
    // Who may only look can't look after anything; oneself is nearest.
    expect(await Promise.all(items.map((item) => item.getText()))).toEqual(['Maren Oxley', 'Jo Ashdown']);
    await menu.clickItem({ text: 'Jo Ashdown' });
    const assignee = { personId: inventedId(171), name: 'Jo Ashdown' };
    const request = await answered('PUT', 'assignee', { assignee });
    expect(request.request.body).toEqual({ personId: inventedId(171) });
    expect(text()).toContain('Jo Ashdown looks after it');
    await undo();
    expect((await answered('PUT', 'assignee', {})).request.body).toEqual({ personId: null });
  });

  it('is nothing for who may only look', async () => {
    await shown({ ...seen, deeds: [deed], quiet }, 'viewer');
    expect(page().querySelectorAll('button')).toHaveLength(0);
    expect(text()).toContain('Seen by Maren Oxley');
  });

  it('is only to note what was done once it is over', async () => {
    await shown({ endedAt: '2026-12-01T14:10:00Z', clearedAt: '2026-12-01T14:20:00Z', quiet });
    const buttons = await loader.getAllHarnesses(MatButtonHarness);
    expect(await Promise.all(buttons.map((button) => button.getText()))).toEqual([
      expect.stringContaining('What was done'),
    ]);
    expect(text()).not.toContain('set by Jo Ashdown');
  });

  it('leaves to their author what others have written, except for keepers', async () => {
    const others = {
      ...seen,
      acknowledgedById: inventedId(171),
      deeds: [{ ...deed, personId: inventedId(171) }],
    };
    await shown(others);
    expect(page().querySelectorAll('app-alert-standing button')).toHaveLength(0);
    TestBed.resetTestingModule();
    await shown(others, 'keeper');
    expect(page().querySelectorAll('app-alert-standing button')).toHaveLength(2);
  });

  it('is said to have failed when it did', async () => {
    await shown();
    await press('Acknowledge');
    server.expectOne(`${address}/acknowledgement`).flush(null, { status: 503, statusText: 'x' });
    await fixture.whenStable();
    expect(await (await loader.getHarness(MatSnackBarHarness)).getMessage()).toContain('Nothing was lost');
    expect(text()).not.toContain('Seen by');
  });
});
