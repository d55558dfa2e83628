import { TestbedHarnessEnvironment } from '@angular/cdk/testing/testbed';
import type { HttpTestingController } from '@angular/common/http/testing';
import { TestBed, type ComponentFixture } from '@angular/core/testing';
import { MatButtonHarness } from '@angular/material/button/testing';
import { MAT_DIALOG_DATA, MatDialogRef } from '@angular/material/dialog';
import { MatInputHarness } from '@angular/material/input/testing';
import type { WantedLight } from '@shared/contracts/rooms';
import type { LightOfDay } from '@shared/contracts/series';
import { membership } from '../../core/testing/account-builder';
import { inventedId } from '../../core/testing/board-builder';
import { providePlayedServer, signedInAs } from '../../core/testing/signed-in';
import { WantedLightDialog, type WantedLightSubject } from './wanted-light-dialog';

const params = { roomId: membership().roomId, shelfId: inventedId(1) };
const address = `/api/v1/rooms/${params.roomId}/shelves/${params.shelfId}`;
const ofPlantings: WantedLight = {
  leastMolM2D: 10,
  source: 'plantings',
  reason: 'Leek seedlings',
  since: '2026-11-01T00:00:00Z',
};
const light: LightOfDay[] = ['28', '29', '30'].map((day) => ({
  day: `2026-11-${day}`,
  lightHours: 14,
  plannedHours: 14,
  dliMolM2D: 9,
  coverage: 1,
}));

describe('setting the light of a day', () => {
  let server: HttpTestingController;
  let fixture: ComponentFixture<WantedLightDialog>;
  const closed: unknown[] = [];
  const text = (): string =>
    ((fixture.nativeElement as HTMLElement).textContent ?? '').replace(/[\s\u00a0]+/g, ' ');
  const press = async (name: string): Promise<void> =>
    (
      await TestbedHarnessEnvironment.loader(fixture).getHarness(MatButtonHarness.with({ text: name }))
    ).click();
  const type = async (value: string): Promise<void> => {
    const loader = TestbedHarnessEnvironment.loader(fixture);
    const field = await loader.getHarness(MatInputHarness.with({ selector: '[type=number]' }));
    await field.setValue(value);
  };

  async function shown(of: WantedLight | null): Promise<void> {
    closed.length = 0;
    TestBed.configureTestingModule({
      providers: [
        ...providePlayedServer(),
        { provide: MAT_DIALOG_DATA, useValue: { params, light: of } satisfies WantedLightSubject },
        { provide: MatDialogRef, useValue: { close: (answer: unknown) => closed.push(answer) } },
      ],
    });
    server = signedInAs();
    fixture = TestBed.createComponent(WantedLightDialog);
    TestBed.tick();
    server
      .expectOne(({ url }) => url === `${address}/report`)
      .flush({ statistics: [], light, plannedLamps: [], measuredLamps: [], events: [] });
    await fixture.whenStable();
  }

  it('says where the present one comes from, and what the typed one would have done', async () => {
    await shown(ofPlantings);
    expect(text()).toContain('This one comes from what grows here (Leek seedlings)');
    expect(text()).toContain('All fall short of that, and an alert would have opened once.');
    await type('9');
    expect(text()).toContain('None falls short of that');
    expect(text()).not.toContain('Go by what grows here');
  });

  it('saves zero, which is any light at all', async () => {
    await shown(ofPlantings);
    await type('0');
    await press('Save the light');
    const saved = server.expectOne({ method: 'PUT', url: `${address}/wanted-light` });
    expect(saved.request.body).toEqual({ leastMolM2D: 0, reason: '' });
    saved.flush({ ...ofPlantings, leastMolM2D: 0, source: 'shelf' });
    expect(closed).toEqual([true]);
  });

  it.each(['', '-1', '101'])('refuses “%s” before it is sent', async (value) => {
    await shown(null);
    await type(value);
    await press('Save the light');
    expect(text()).toContain('Give a sum from 0 to 100 mol/m²');
    server.expectNone({ method: 'PUT' });
  });

  it('set by a person can be left to what grows there', async () => {
    await shown({ ...ofPlantings, source: 'shelf', reason: 'cut young' });
    await press('Go by what grows here');
    server
      .expectOne({ method: 'DELETE', url: `${address}/wanted-light` })
      .flush(null, { status: 204, statusText: '' });
    expect(closed).toEqual([true]);
  });
});
