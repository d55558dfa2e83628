import { TestbedHarnessEnvironment } from '@angular/cdk/testing/testbed';
import type { HarnessLoader } from '@angular/cdk/testing';
import type { HttpTestingController } from '@angular/common/http/testing';
import { TestBed, type ComponentFixture } from '@angular/core/testing';
import { MATERIAL_ANIMATIONS } from '@angular/material/core';
import { MatButtonHarness } from '@angular/material/button/testing';
import { MatDialogHarness } from '@angular/material/dialog/testing';
import { MatInputHarness } from '@angular/material/input/testing';
import type { Crop } from '@shared/contracts/crops';
import type { Role } from '@shared/contracts/people';
import { account, membership } from '../../core/testing/account-builder';
import { providePlayedServer, signedInAs } from '../../core/testing/signed-in';
import { libraryCrop } from '../testing/library-crop';
import { CropPage } from './crop-page';

const base = `/api/v1/rooms/${membership().roomId}`;
const ownId = '0b6f6c0e-0000-4000-8000-000000000999';

describe('the page of a crop', () => {
  let fixture: ComponentFixture<CropPage>;
  let server: HttpTestingController;
  let document: HarnessLoader;
  const page = (): HTMLElement => fixture.nativeElement as HTMLElement;
  const button = (text: string | RegExp): Promise<MatButtonHarness> =>
    document.getHarness(MatButtonHarness.with({ text }));

  async function shown(crop: Crop, role: Role = 'grower'): Promise<void> {
    TestBed.configureTestingModule({
      providers: [
        ...providePlayedServer(),
        { provide: MATERIAL_ANIMATIONS, useValue: { animationsDisabled: true } },
      ],
    });
    server = signedInAs(account({ memberships: [membership({ role })] }));
    fixture = TestBed.createComponent(CropPage);
    fixture.componentRef.setInput('cropId', crop.id);
    document = TestbedHarnessEnvironment.documentRootLoader(fixture);
    TestBed.tick();
    server.expectOne(`${base}/crops/${crop.id}`).flush(crop);
    server.expectOne(`${base}/varieties`).flush([]);
    await fixture.whenStable();
  }
  afterEach(() => server.verify());

  it('of the library shows who says what, and changes nothing', async () => {
    await shown(libraryCrop('leek'));
    expect(page().querySelector('h1')?.textContent).toBe('Leek');
    expect(page().textContent).toContain('Harms cats or dogs that eat of it.');
    expect(page().textContent).toContain('no figure found');
    expect(page().querySelector('[aria-label^="Change "]')).toBeNull();
    expect(page().querySelector('[aria-label^="Add a figure"]')).toBeNull();
  });

  it('is copied under a name, and a taken name is said at the field', async () => {
    await shown(libraryCrop('leek'));
    await (await button(/Copy it for this room/)).click();
    const dialog = await document.getHarness(MatDialogHarness);
    const name = await dialog.getHarness(MatInputHarness);
    expect(await name.getValue()).toBe('Leek, ours');
    await name.setValue('Chives');
    await (await button('Copy it')).click();
    const first = server.expectOne(`${base}/crops`);
    expect(first.request.body).toEqual({ copyOf: 'leek', name: 'Chives' });
    first.flush(
      {
        type: 'about:blank',
        title: 'x',
        status: 422,
        code: 'INVALID',
        errors: [{ path: 'body.name', message: 'is the name of another crop' }],
      },
      { status: 422, statusText: 'x' },
    );
    await fixture.whenStable();
    expect(await dialog.getText()).toContain('Is the name of another crop.');
    await name.setValue('Leek of the cellar');
    await (await button('Copy it')).click();
    server
      .expectOne(`${base}/crops`)
      .flush(libraryCrop('leek', { id: ownId, isOwn: true, copiedFrom: 'leek' }));
    await fixture.whenStable();
    expect(await document.getHarnessOrNull(MatDialogHarness)).toBeNull();
  });

  it('of the room has a figure changed, and shows it at once', async () => {
    const own = libraryCrop('leek', { id: ownId, isOwn: true, copiedFrom: 'leek' });
    await shown(own);
    const change = page().querySelector<HTMLButtonElement>('[aria-label^="Change Sowing depth"]');
    change?.click();
    const dialog = await document.getHarness(MatDialogHarness);
    const [low, high, source] = await dialog.getAllHarnesses(MatInputHarness);
    await low?.setValue('20');
    await high?.setValue('10');
    await source?.setValue('Our own trials');
    await (await button('Save the figure')).click();
    expect(await dialog.getText()).toContain('Lowest must not be above highest.');
    await high?.setValue('25');
    await (await button('Save the figure')).click();
    const saving = server.expectOne(`${base}/crops/${ownId}`);
    const body = saving.request.body as Crop;
    expect(saving.request.method).toBe('PUT');
    expect(body.seed?.depthMm).toEqual({ value: { low: 20, high: 25 }, source: 'Our own trials' });
    expect(body).not.toHaveProperty('isOwn');
    saving.flush({ ...own, ...body });
    await fixture.whenStable();
    expect(page().textContent?.replaceAll('\u2060', '')).toContain('20–25\u00a0mm');
  });

  it('of the room has fields changed that are no range, each wrong one said at its field', async () => {
    const own = libraryCrop('leek', { id: ownId, isOwn: true, copiedFrom: 'leek' });
    await shown(own);
    page().querySelector<HTMLButtonElement>('[aria-label^="Change Warmth to germinate"]')?.click();
    const dialog = await document.getHarness(MatDialogHarness);
    const least = await dialog.getHarness(MatInputHarness.with({ label: 'Not under' }));
    await least.setValue('59');
    await (await button('Save the figure')).click();
    expect(await dialog.getText()).toContain('Must not be above where it is good from.');
    await least.setValue('1');
    await (await dialog.getHarness(MatInputHarness.with({ label: 'Who says so' }))).setValue('');
    await (await button('Save the figure')).click();
    const saving = server.expectOne(`${base}/crops/${ownId}`);
    const body = saving.request.body as Crop;
    expect(body.seed?.temperatures[0]).toMatchObject({ value: { minC: 1 }, source: 'our own experience' });
    saving.flush({ ...own, ...body });
    await fixture.whenStable();
    expect(page().textContent).toContain('not under 1');
  });

  it('of the room has its table by warmth changed, row by row', async () => {
    const own = libraryCrop('onion-long-day', { id: ownId, isOwn: true });
    await shown(own);
    await (await button(/^Change the table: days until up/)).click();
    const dialog = await document.getHarness(MatDialogHarness);
    await (await button(/Add a row/)).click();
    const inputs = await dialog.getAllHarnesses(MatInputHarness);
    await inputs.at(-3)?.setValue('20');
    await inputs.at(-2)?.setValue('9');
    await (await button('Save the figure')).click();
    expect(await dialog.getText()).toContain('It stands above already.');
    await inputs.at(-3)?.setValue('22');
    await (await button('Save the figure')).click();
    const saving = server.expectOne(`${base}/crops/${ownId}`);
    const body = saving.request.body as Crop;
    expect(body.seed?.emergence?.value).toContainEqual({ temperatureC: 22, days: 9 });
    expect(body.seed?.emergence?.value).toHaveLength((own.seed?.emergence?.value.length ?? 0) + 1);
    saving.flush({ ...own, ...body });
    await fixture.whenStable();
    expect(page().querySelector('table')?.textContent).toContain('22');
  });

  it('offers a helper nothing to change', async () => {
    await shown(libraryCrop('leek', { id: ownId, isOwn: true, copiedFrom: 'leek' }), 'helper');
    expect(page().querySelector('.deeds')?.textContent.trim()).toBe('');
    expect(page().querySelector('[aria-label^="Change "]')).toBeNull();
  });
});
