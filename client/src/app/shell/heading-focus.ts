import { LiveAnnouncer } from '@angular/cdk/a11y';
import { DOCUMENT } from '@angular/common';
import { Injectable, Injector, afterNextRender, inject } from '@angular/core';
import { Title } from '@angular/platform-browser';
import { NavigationEnd, Router } from '@angular/router';
import { filter, map, pairwise } from 'rxjs';

/**
 * On every navigation to another path the focus goes to the new screen's main heading and the
 * title is spoken. The first load and a changed filter (query only) leave the focus alone.
 */
@Injectable({ providedIn: 'root' })
export class HeadingFocus {
  private readonly document = inject(DOCUMENT);
  private readonly announcer = inject(LiveAnnouncer);
  private readonly injector = inject(Injector);
  private readonly title = inject(Title);
  private readonly router = inject(Router);

  /** Runs as long as the app does. */
  follow(): void {
    this.router.events
      .pipe(
        filter((event) => event instanceof NavigationEnd),
        map((event) => event.urlAfterRedirects.split(/[?#]/, 1)[0]),
        pairwise(),
        filter(([before, after]) => before !== after),
      )
      .subscribe(() => afterNextRender(() => this.focusHeading(), { injector: this.injector }));
  }

  private focusHeading(): void {
    const main = this.document.querySelector<HTMLElement>('main');
    const target = main?.querySelector<HTMLElement>('h1') ?? main;
    if (!target) return;
    if (!target.hasAttribute('tabindex')) target.setAttribute('tabindex', '-1');
    target.focus({ preventScroll: true });
    void this.announcer.announce(this.title.getTitle());
  }
}
