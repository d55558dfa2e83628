import { inventedId } from '../../core/testing/board-builder';
import { listedPlanting } from '../testing/planting-builder';
import { deedsOf } from './deed';
import { deedForm, deedOf } from './deed-fields';

const zone = 'Europe/Dublin';
const seedlings = listedPlanting({ stage: 'seedling', up: 31, count: 31 });

describe('what may be done to a planting', () => {
  it('is nothing once it has ended', () => {
    expect(deedsOf(listedPlanting({ stage: 'ended' }), 'keeper')).toEqual([]);
  });

  it('of seed below ground is no harvest and no pricking out', () => {
    expect(deedsOf(listedPlanting(), 'grower')).toEqual(['moved', 'lost', 'noted', 'ended']);
  });

  it('by a helper is to harvest and to note, by a viewer nothing', () => {
    expect(deedsOf(seedlings, 'helper')).toEqual(['harvested', 'noted']);
    expect(deedsOf(seedlings, 'viewer')).toEqual([]);
  });

  it('takes another planting in only where its crop is known', () => {
    expect(deedsOf(seedlings, 'grower')).toContain('merged');
    expect(deedsOf({ ...seedlings, cropId: null }, 'grower')).not.toContain('merged');
  });
});

describe('a deed', () => {
  it('begins with all of them to prick out, and needs something to prick them into', () => {
    const form = deedForm('prickedOut', seedlings);
    expect(form.invalid).toBe(true);
    form.patchValue({ container: ' 7 cm pot ' });
    expect(form.valid).toBe(true);
    expect(deedOf('prickedOut', form, zone)).toEqual({
      via: 'step',
      body: { kind: 'prickedOut', count: 31, container: '7 cm pot', note: '', at: undefined },
    });
    form.patchValue({ count: 32 });
    expect(form.controls.count.invalid).toBe(true);
  });

  it('of moving asks where to; no shelf is an answer', () => {
    const form = deedForm('moved', seedlings);
    expect(form.invalid).toBe(true);
    form.patchValue({ shelfId: '' });
    expect(form.valid).toBe(true);
    expect(deedOf('moved', form, zone)).toMatchObject({ body: { kind: 'moved', shelfId: null } });
    form.patchValue({ shelfId: inventedId(2), at: '2026-12-01T09:00' });
    expect(deedOf('moved', form, zone)).toMatchObject({
      body: { shelfId: inventedId(2), at: '2026-12-01T09:00:00.000Z' },
    });
  });

  it('of harvesting wants a weight or a number, which may be above that of the plants', () => {
    const form = deedForm('harvested', seedlings);
    expect(form.invalid).toBe(true);
    form.patchValue({ count: 90 });
    expect(form.valid).toBe(true);
    expect(deedOf('harvested', form, zone)).toEqual({
      via: 'observation',
      body: { kind: 'harvested', grams: null, count: 90, note: '', at: undefined },
    });
  });

  it('of losing says how many of those that stand, and why', () => {
    const form = deedForm('lost', seedlings);
    form.patchValue({ count: 40 });
    expect(form.invalid).toBe(true);
    form.patchValue({ count: 2, lossReason: 'dampingOff' });
    expect(deedOf('lost', form, zone)).toMatchObject({
      via: 'step',
      body: { kind: 'lost', count: 2, lossReason: 'dampingOff' },
    });
  });

  it('of hardening off sets that stage', () => {
    expect(deedOf('hardened', deedForm('hardened', seedlings), zone)).toMatchObject({
      body: { kind: 'staged', stage: 'hardeningOff' },
    });
  });

  it('of planting out is all of them unless a number is given', () => {
    const form = deedForm('plantedOut', seedlings);
    expect(form.valid).toBe(true);
    expect(deedOf('plantedOut', form, zone)).toMatchObject({ body: { count: null } });
  });

  it('of parting keeps shelf and container unless others are given', () => {
    const form = deedForm('split', seedlings);
    form.patchValue({ count: 10 });
    const { body } = deedOf('split', form, zone);
    expect(body).toMatchObject({ count: 10, shelfId: seedlings.shelfId });
    expect(body).not.toHaveProperty('container');
  });

  it('of taking in names the other', () => {
    const form = deedForm('merged', seedlings);
    expect(form.invalid).toBe(true);
    form.patchValue({ otherId: inventedId(501) });
    expect(deedOf('merged', form, zone)).toMatchObject({ via: 'merge', body: { otherId: inventedId(501) } });
  });

  it('of noting is not kept without words', () => {
    const form = deedForm('noted', seedlings);
    form.patchValue({ note: '   ' });
    expect(form.invalid).toBe(true);
    form.patchValue({ note: ' First true leaf ' });
    expect(deedOf('noted', form, zone)).toMatchObject({
      via: 'observation',
      body: { kind: 'noted', note: 'First true leaf' },
    });
  });
});
