import { ChangeDetectionStrategy, Component, ElementRef, inject, viewChild } from '@angular/core';
import { RouterLink, RouterOutlet } from '@angular/router';

import { Connection } from './http/connection';
import { HeadingFocus } from './shell/heading-focus';
import { SiteHeader } from './shell/site-header';
import { Icon } from './ui/icon';

/** The frame around every screen: header, line to the server, the screen, footer. */
@Component({
  selector: 'tn-root',
  changeDetection: ChangeDetectionStrategy.OnPush,
  imports: [Icon, RouterLink, RouterOutlet, SiteHeader],
  templateUrl: './app.html',
  styleUrl: './app.scss',
})
export class App {
  protected readonly connection = inject(Connection).state;
  private readonly main = viewChild.required<ElementRef<HTMLElement>>('main');

  constructor() {
    inject(HeadingFocus).follow();
  }

  protected skipToContent(event: Event): void {
    event.preventDefault();
    this.main().nativeElement.focus();
  }
}
