import { ChangeDetectionStrategy, Component, computed, input } from '@angular/core';
import { qrPath } from './qr-path';

const quietZone = 2;

/** A QR code, black on white whatever the theme: cameras want contrast. */
@Component({
  selector: 'app-qr-code',
  template: `
    <svg role="img" shape-rendering="crispEdges" [attr.viewBox]="viewBox()" [attr.aria-label]="label()">
      <rect class="ground" width="100%" height="100%" [attr.x]="-quiet" [attr.y]="-quiet" />
      <path [attr.d]="code().d" />
    </svg>
  `,
  styles: `
    :host {
      display: block;
    }

    svg {
      display: block;
      width: 100%;
      height: 100%;
    }

    .ground {
      fill: #fff;
    }

    path {
      fill: #000;
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class QrCode {
  readonly text = input.required<string>();
  /** What it leads to, for a screen reader. */
  readonly label = input.required<string>();

  protected readonly quiet = quietZone;
  protected readonly code = computed(() => qrPath(this.text()));
  protected readonly viewBox = computed(() => {
    const side = this.code().size + 2 * quietZone;
    return `${-quietZone} ${-quietZone} ${side} ${side}`;
  });
}
