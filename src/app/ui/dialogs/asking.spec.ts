import { TestbedHarnessEnvironment } from '@angular/cdk/testing/testbed';
import type { HarnessLoader } from '@angular/cdk/testing';
import { Component, inject } from '@angular/core';
import { TestBed } from '@angular/core/testing';
import { MATERIAL_ANIMATIONS } from '@angular/material/core';
import { MatButtonHarness } from '@angular/material/button/testing';
import { MatDialogHarness } from '@angular/material/dialog/testing';
import { firstValueFrom } from 'rxjs';
import { Asking } from './asking';

@Component({ template: '' })
class Host {
  readonly asking = inject(Asking);
}

const question = {
  title: 'Delete shelf A3?',
  text: 'Its readings stay with the room.',
  confirm: 'Delete the shelf',
  isDestructive: true,
};

let loader: HarnessLoader;
let host: Host;

beforeEach(() => {
  TestBed.configureTestingModule({
    providers: [{ provide: MATERIAL_ANIMATIONS, useValue: { animationsDisabled: true } }],
  });
  const fixture = TestBed.createComponent(Host);
  loader = TestbedHarnessEnvironment.documentRootLoader(fixture);
  host = fixture.componentInstance;
});

describe('asking before a deed', () => {
  it('shows what will happen and answers yes when the deed is chosen', async () => {
    const answer = firstValueFrom(host.asking.ask(question));
    const dialog = await loader.getHarness(MatDialogHarness);
    expect(await dialog.getRole()).toBe('alertdialog');
    expect(await dialog.getText()).toContain('Its readings stay with the room.');
    await (await loader.getHarness(MatButtonHarness.with({ text: 'Delete the shelf' }))).click();
    expect(await answer).toBe(true);
  });

  it('answers no when the dialog is left or closed by its key', async () => {
    const left = firstValueFrom(host.asking.ask(question));
    await (await loader.getHarness(MatButtonHarness.with({ text: 'Leave it' }))).click();
    expect(await left).toBe(false);

    const closed = firstValueFrom(host.asking.ask(question));
    await (await loader.getHarness(MatDialogHarness)).close();
    expect(await closed).toBe(false);
  });

  it('about something destructive has the focus on the way back', async () => {
    host.asking.ask(question).subscribe();
    const back = await loader.getHarness(MatButtonHarness.with({ text: 'Leave it' }));
    expect(await back.isFocused()).toBe(true);
  });
});
