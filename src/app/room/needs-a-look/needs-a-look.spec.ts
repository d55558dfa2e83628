import { TestBed, type ComponentFixture } from '@angular/core/testing';
import type { Alert } from '@shared/contracts/alerts';
import { alert, inventedId } from '../../core/testing/board-builder';
import { providePlayedServer, signedInAs } from '../../core/testing/signed-in';
import { NeedsALook } from './needs-a-look';

describe('what needs a look', () => {
  let fixture: ComponentFixture<NeedsALook>;
  const page = (): HTMLElement => fixture.nativeElement as HTMLElement;
  const texts = (selector: string): string[] =>
    [...page().querySelectorAll(selector)].map((part) => part.textContent.replaceAll('\u00a0', ' ').trim());

  async function shown(alerts: Alert[], mayAcknowledge = true): Promise<void> {
    TestBed.configureTestingModule({ providers: providePlayedServer() });
    signedInAs();
    fixture = TestBed.createComponent(NeedsALook);
    fixture.componentRef.setInput('alerts', alerts);
    fixture.componentRef.setInput('mayAcknowledge', mayAcknowledge);
    await fixture.whenStable();
  }

  it('says what is wrong, for how long, how far it went and when the mail went out', async () => {
    await shown([alert()]);
    expect(texts('li a')).toEqual(['A1 air is 2.3 °C too warm']);
    expect(page().querySelector('li a')?.getAttribute('href')).toBe(`/shelf/${inventedId(1)}`);
    expect(texts('li p')).toEqual(['26 min · peak 28.3 °C · mail sent 14:06']);
  });

  it('of a silent sensor has no peak', async () => {
    await shown([alert({ kind: 'sensorSilent', toldAt: null, beganAt: '2026-12-01T11:52:00Z' })]);
    expect(texts('li p')).toEqual(['2 h 28 min']);
  });

  it('can be acknowledged, once at a time', async () => {
    await shown([alert()]);
    const acknowledged: Alert[] = [];
    fixture.componentInstance.acknowledged.subscribe((one) => acknowledged.push(one));
    const button = page().querySelector('button');
    expect(button?.getAttribute('aria-label')).toMatch(/^Acknowledge: A1 air is 2.3.°C too warm$/);
    button?.click();
    expect(acknowledged).toEqual([alert()]);
    fixture.componentRef.setInput('busyIds', new Set([alert().id]));
    await fixture.whenStable();
    expect(button?.disabled).toBe(true);
  });

  it('says who has seen it', async () => {
    const seen = { acknowledgedAt: '2026-12-01T14:10:00Z', acknowledgedByName: 'Tomasz Keel' };
    await shown([alert(seen)]);
    expect(texts('.standing')[0]).toContain('Seen by Tomasz Keel, 14:10');
    expect(page().querySelector('button')).toBeNull();
  });

  it('says until when it is quiet and who looks after it, and lists what is quiet last', async () => {
    const quiet = { until: '2026-12-01T17:00:00Z', setAt: '2026-12-01T14:10:00Z', setByName: 'Jo Ashdown' };
    const assignee = { personId: inventedId(902), name: 'Tomasz Keel' };
    await shown([
      alert({ quiet, assignee }),
      alert({ id: inventedId(901), shelfLabel: 'B2', quiet: { ...quiet, until: '2026-12-01T14:19:59Z' } }),
    ]);
    expect(texts('li a').map((title) => title.slice(0, 2))).toEqual(['B2', 'A1']);
    expect(texts('li:first-child .standing')).toEqual([]);
    const standing = texts('li:last-child .standing');
    expect(standing).toHaveLength(2);
    expect(standing[0]).toContain('Quiet until 17:00, set by Jo Ashdown');
    expect(standing[1]).toContain('Tomasz Keel looks after it');
    expect(page().querySelectorAll('button')).toHaveLength(2);
  });

  it('offers nothing to somebody who may only look', async () => {
    await shown([alert()], false);
    expect(page().querySelector('button')).toBeNull();
  });

  it('lists what a shelf needs for its plants, which is not to be acknowledged', async () => {
    await shown([]);
    const need = {
      title: 'A3 needs light now',
      why: 'Leek has come up.',
      note: '',
      tone: 'lamp',
      icon: 'lightbulb',
    };
    fixture.componentRef.setInput('needs', [{ id: 'a', link: ['/shelf', inventedId(3)], ...need }]);
    await fixture.whenStable();
    expect(texts('li a')).toEqual(['A3 needs light now']);
    expect(page().querySelector('li a')?.getAttribute('href')).toBe(`/shelf/${inventedId(3)}`);
    expect(texts('li p')).toEqual(['Leek has come up.']);
    expect(page().querySelector('button')).toBeNull();
  });

  it('says so when there is nothing', async () => {
    await shown([]);
    expect(texts('li p')).toEqual(['Every shelf is as it should be.']);
  });
});
