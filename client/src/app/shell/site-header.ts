import { NgTemplateOutlet } from '@angular/common';
import {
  ChangeDetectionStrategy,
  Component,
  ElementRef,
  computed,
  inject,
  signal,
} from '@angular/core';
import { takeUntilDestroyed } from '@angular/core/rxjs-interop';
import { MatButton } from '@angular/material/button';
import { NavigationStart, Router, RouterLink, RouterLinkActive } from '@angular/router';
import { filter } from 'rxjs';

import { SessionStore } from '../auth/session-store';
import { Icon } from '../ui/icon';
import { Mark } from '../ui/mark';
import { AccountLinks } from './account-links';
import { ThemePicker } from './theme-picker';

/** The stone across the top: mark, places, filing, and the account. */
@Component({
  selector: 'tn-site-header',
  changeDetection: ChangeDetectionStrategy.OnPush,
  imports: [
    AccountLinks,
    Icon,
    Mark,
    MatButton,
    NgTemplateOutlet,
    RouterLink,
    RouterLinkActive,
    ThemePicker,
  ],
  templateUrl: './site-header.html',
  styleUrl: './site-header.scss',
  host: {
    '(keydown.escape)': 'closeOnEscape($event)',
    '(document:click)': 'closeOnOutsideClick($event)',
  },
})
export class SiteHeader {
  private readonly session = inject(SessionStore);
  private readonly router = inject(Router);
  private readonly host = inject<ElementRef<HTMLElement>>(ElementRef).nativeElement;

  protected readonly person = this.session.person;
  protected readonly isKnown = this.session.isKnown;
  protected readonly isModerator = computed(() => this.session.hasRole('moderator'));
  protected readonly accountName = computed(() => {
    const clubs = this.session.clubs();
    return clubs.length === 1 && clubs[0] ? clubs[0].name : (this.person()?.displayName ?? '');
  });
  protected readonly placesOpen = signal(false);
  protected readonly accountOpen = signal(false);
  protected readonly returnTo = signal('/');

  constructor() {
    this.router.events
      .pipe(
        filter((event) => event instanceof NavigationStart),
        takeUntilDestroyed(),
      )
      .subscribe(({ url }) => {
        this.closeAll();
        this.returnTo.set(url);
      });
  }

  protected togglePlaces(): void {
    this.placesOpen.update((open) => !open);
    this.accountOpen.set(false);
  }

  protected toggleAccount(): void {
    this.accountOpen.update((open) => !open);
    this.placesOpen.set(false);
  }

  protected closeAll(): void {
    this.placesOpen.set(false);
    this.accountOpen.set(false);
  }

  protected closeOnEscape(event: Event): void {
    if (!this.placesOpen() && !this.accountOpen()) return;
    const panel = event.target instanceof Element ? event.target.closest('[data-panel]') : null;
    const opener = panel?.parentElement?.querySelector<HTMLElement>('[aria-expanded]');
    this.closeAll();
    // Focus inside a panel that vanishes would fall back to the top of the page.
    opener?.focus();
  }

  protected closeOnOutsideClick(event: Event): void {
    const inside = event.target instanceof Node && this.host.contains(event.target);
    if (!inside) this.closeAll();
  }
}
