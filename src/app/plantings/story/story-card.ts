import { ChangeDetectionStrategy, Component, computed, inject, signal } from '@angular/core';
import { MatButton } from '@angular/material/button';
import { MatIcon } from '@angular/material/icon';
import { RouterLink } from '@angular/router';
import { KeptPhotos } from '../../core/kept-photos';
import { ReaderFormat } from '../../core/reader-format';
import { Session } from '../../core/session';
import { PlantingData } from '../planting/planting-data';
import { plantingTitle } from '../words/planting-facts';
import { storyOf } from './story';
import { StoryClimate } from './story-climate';

const fewLines = 8;

/** What happened to the planting, over the climate of where it stood. */
@Component({
  selector: 'app-story-card',
  templateUrl: './story-card.html',
  styleUrl: './story-card.scss',
  imports: [MatButton, MatIcon, RouterLink, StoryClimate],
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class StoryCard {
  private readonly format = inject(ReaderFormat);
  private readonly kept = inject(KeptPhotos);
  private readonly session = inject(Session);
  protected readonly data = inject(PlantingData);

  private readonly story = computed(() => {
    const planting = this.data.planting();
    if (planting === null) return [];
    const shown = this.kept.shown(planting.photos, plantingTitle(planting));
    const photos = new Map(shown.map((photo) => [photo.id, photo]));
    return storyOf(planting).map((line) => ({
      ...line,
      origin: [this.format.when(line.at), line.personName].filter((part) => part !== null).join(' · '),
      photo: line.photoId === null ? null : (photos.get(line.photoId) ?? null),
    }));
  });
  protected readonly showsAll = signal(false);
  protected readonly lines = computed(() =>
    this.showsAll() ? this.story() : this.story().slice(0, fewLines),
  );
  protected readonly hiddenLines = computed(() => this.story().length - this.lines().length);
  protected readonly mayUndo = computed(() => this.session.may('helper'));
}
