import { TestBed } from '@angular/core/testing';
import { MatSnackBarHarness } from '@angular/material/snack-bar/testing';
import { TestbedHarnessEnvironment } from '@angular/cdk/testing/testbed';
import { Component } from '@angular/core';
import { ApiFailure } from './api-failure';
import { Notices } from './notices';

@Component({ template: '' })
class Page {}

describe('notices', () => {
  const shown = (): Promise<MatSnackBarHarness> =>
    TestbedHarnessEnvironment.documentRootLoader(TestBed.createComponent(Page)).getHarness(
      MatSnackBarHarness,
    );

  it('offer a way back and say when it is taken', async () => {
    let undone = 0;
    TestBed.inject(Notices)
      .sayUndoable('Ticked: Water A1')
      .subscribe(() => (undone += 1));
    const notice = await shown();
    expect(await notice.getMessage()).toBe('Ticked: Water A1');
    expect(await notice.getActionDescription()).toBe('Undo');
    await notice.dismissWithAction();
    expect(undone).toBe(1);
  });

  it('say why something failed', async () => {
    TestBed.inject(Notices).sayFailure(new ApiFailure('forbidden'));
    expect(await (await shown()).getMessage()).toContain('Your role in this room');
  });
});
