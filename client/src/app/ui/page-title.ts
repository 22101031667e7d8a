import { Injectable, inject } from '@angular/core';
import { Title } from '@angular/platform-browser';
import { RouterStateSnapshot, TitleStrategy } from '@angular/router';

/**
 * "Reports · Touchneedle". A screen that knows a better title only after loading sets it by
 * {@link nameScreen}.
 */
@Injectable({ providedIn: 'root' })
export class PageTitle extends TitleStrategy {
  private readonly title = inject(Title);

  override updateTitle(snapshot: RouterStateSnapshot): void {
    this.nameScreen(this.buildTitle(snapshot));
  }

  nameScreen(name: string | undefined): void {
    this.title.setTitle(name ? `${name} · Touchneedle` : 'Touchneedle');
  }
}
