import { ChangeDetectionStrategy, Component, computed, input, output } from '@angular/core';
import { MatFormFieldModule } from '@angular/material/form-field';
import { MatInput } from '@angular/material/input';
import { Circle, PlacedPhoto } from '#shared/reports/photo';

import { Framing, boundedCircle, wrappedDegrees } from '../circle-handles';

/** Circle and upright of the coin by numbers, for whom the handles on the photo don't suit. */
@Component({
  selector: 'tn-circle-fields',
  changeDetection: ChangeDetectionStrategy.OnPush,
  imports: [MatFormFieldModule, MatInput],
  template: `
    <mat-form-field>
      <mat-label i18n>Centre, from the left, %</mat-label>
      <input
        #across matInput type="number" step="0.1" min="0" max="100"
        [value]="percent(circle().x)"
        (change)="setCircle({ x: across.valueAsNumber / 100 })"
      />
    </mat-form-field>
    <mat-form-field>
      <mat-label i18n>Centre, from the top, %</mat-label>
      <input
        #down matInput type="number" step="0.1" min="0" max="100"
        [value]="percent(circle().y)"
        (change)="setCircle({ y: down.valueAsNumber / 100 })"
      />
    </mat-form-field>
    <mat-form-field>
      <mat-label i18n>Radius, % of the width</mat-label>
      <input
        #radius matInput type="number" step="0.1" min="2" max="100"
        [value]="percent(circle().radius)"
        (change)="setCircle({ radius: radius.valueAsNumber / 100 })"
      />
    </mat-form-field>
    <mat-form-field>
      <mat-label i18n>Turned clockwise, degrees</mat-label>
      <input
        #turned matInput type="number" step="0.1" min="0" max="360"
        [value]="placed().uprightDegrees"
        (change)="turn(turned.valueAsNumber)"
      />
    </mat-form-field>
  `,
  styles: `
    :host {
      display: grid;
      grid-template-columns: repeat(auto-fit, minmax(160px, 1fr));
      gap: 12px;
      padding-top: 12px;
    }
  `,
})
export class CircleFields {
  readonly placed = input.required<PlacedPhoto>();

  readonly framed = output<Partial<Framing>>();

  protected readonly circle = computed(
    (): Circle => this.placed().circle ?? { x: 0.5, y: 0.5, radius: 0.4 },
  );

  protected setCircle(change: Partial<Circle>): void {
    const circle = { ...this.circle(), ...change };
    if (Object.values(circle).some((value) => Number.isNaN(value))) return;
    this.framed.emit({ circle: boundedCircle(circle) });
  }

  protected turn(degrees: number): void {
    if (!Number.isNaN(degrees)) this.framed.emit({ uprightDegrees: wrappedDegrees(degrees) });
  }

  protected percent(fraction: number): number {
    return Math.round(fraction * 1000) / 10;
  }
}
