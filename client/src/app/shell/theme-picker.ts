import { ChangeDetectionStrategy, Component, inject } from '@angular/core';

import { Icon } from '../ui/icon';
import { IconName } from '../ui/icon-paths';
import { Theme, ThemeChoice } from '../ui/theme-choice';

interface ThemeOption {
  readonly theme: Theme;
  readonly icon: IconName;
  readonly label: string;
}

/** Light, dark, or as the device has it. */
@Component({
  selector: 'tn-theme-picker',
  changeDetection: ChangeDetectionStrategy.OnPush,
  imports: [Icon],
  template: `
    <div class="options" role="group" i18n-aria-label aria-label="Light or dark">
      @for (option of options; track option.theme) {
        <button
          type="button"
          [attr.aria-pressed]="chosen() === option.theme"
          (click)="chooseTheme(option.theme)"
        >
          <tn-icon [name]="option.icon" />
          {{ option.label }}
        </button>
      }
    </div>
  `,
  styles: `
    .options {
      display: flex;
      gap: 4px;
      padding: 4px;
      border: 1px solid var(--tn-stone-line);
      border-radius: var(--tn-radius-control);
    }
    button {
      flex: 1;
      min-height: 40px;
      padding: 6px 8px;
      border: 0;
      border-radius: 7px;
      background: none;
      color: var(--tn-on-stone);
      font: 400 15px var(--tn-font-text);
      cursor: pointer;
    }
    button[aria-pressed='true'] {
      background: var(--mat-sys-primary);
      color: var(--mat-sys-on-primary);
      font-weight: 600;
    }
  `,
})
export class ThemePicker {
  private readonly choice = inject(ThemeChoice);

  protected readonly chosen = this.choice.theme;
  protected readonly options: readonly ThemeOption[] = [
    { theme: 'system', icon: 'system-theme', label: $localize`Device` },
    { theme: 'light', icon: 'sun', label: $localize`Light` },
    { theme: 'dark', icon: 'moon', label: $localize`Dark` },
  ];

  protected chooseTheme(theme: Theme): void {
    this.choice.choose(theme);
  }
}
