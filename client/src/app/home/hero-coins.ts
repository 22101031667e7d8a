import { ChangeDetectionStrategy, Component, signal } from '@angular/core';

import { Mark } from '../ui/mark';

/**
 * The known and the suspect side by side, drawn pieces of an invented issuer. Decoration: where
 * the pictures are missing the mark's two streaks stand in their place.
 */
@Component({
  selector: 'tn-hero-coins',
  changeDetection: ChangeDetectionStrategy.OnPush,
  imports: [Mark],
  host: { 'aria-hidden': 'true' },
  template: `
    @if (drawn()) {
      <img class="known" src="/art/front-known.webp" alt="" width="560" height="560"
        (error)="showMark()" />
      <span class="suspect">
        <img src="/art/front-suspect.webp" alt="" width="560" height="560" (error)="showMark()" />
        <i class="one"></i><i class="two"></i><i class="three"></i>
      </span>
    } @else {
      <tn-mark />
    }
  `,
  styles: `
    :host {
      display: block;
      position: relative;
      width: 100%;
      max-width: 500px;
      margin-inline: auto;
      aspect-ratio: 1.42;
    }
    .known,
    .suspect {
      position: absolute;
      width: 59%;
    }
    .known {
      top: 0;
      left: 0;
    }
    .suspect {
      right: 0;
      bottom: 0;
    }
    img {
      display: block;
      width: 100%;
      height: auto;
      border-radius: 50%;
      box-shadow: 0 16px 38px rgb(0 0 0 / 55%);
    }
    .known {
      border-radius: 50%;
    }
    .suspect i {
      position: absolute;
      width: 10%;
      aspect-ratio: 1;
      border: 2.5px solid var(--tn-brass);
      border-radius: 50%;
    }
    .one {
      top: 20.3%;
      left: 19.8%;
    }
    .two {
      top: 43.6%;
      left: 69.3%;
    }
    .three {
      top: 63%;
      left: 43.8%;
    }
    tn-mark {
      display: block;
      width: 58%;
      height: auto;
      margin: 0 auto;
    }
    @media (width < 860px) {
      :host {
        max-width: 270px;
      }
    }
  `,
})
export class HeroCoins {
  protected readonly drawn = signal(true);

  protected showMark(): void {
    this.drawn.set(false);
  }
}
