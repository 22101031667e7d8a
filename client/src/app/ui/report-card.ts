import { ChangeDetectionStrategy, Component, computed, input } from '@angular/core';
import { RouterLink } from '@angular/router';
import { ReportCard as ReportCardView } from '#shared/reports/report-view';

import { Confidence } from './confidence';
import { Disc } from './disc';
import { PlacePipe } from './place-pipe';
import { ReportNumber } from './report-number';
import { channelWords } from './report-words';
import { WhenPipe } from './when-pipe';

const tellsShown = 3;

/** A published report as a card: discs on stone, what it claims to be, tells, how sure, number. */
@Component({
  selector: 'tn-report-card',
  changeDetection: ChangeDetectionStrategy.OnPush,
  imports: [Confidence, Disc, PlacePipe, ReportNumber, RouterLink, WhenPipe],
  templateUrl: './report-card.html',
  styleUrl: './report-card.scss',
})
export class ReportCard {
  readonly report = input.required<ReportCardView>();
  /** Cards above the fold fetch their pictures at once. */
  readonly eager = input(false);
  /** The heading's level: 2 where the card list has no heading of its own. */
  readonly headingLevel = input<2 | 3>(3);

  protected readonly presentedAs = computed(() => {
    const { coinType, year, mintMark } = this.report();
    return [coinType?.name, year, mintMark].filter((part) => part).join(' ');
  });
  protected readonly tells = computed(() => this.report().tells.slice(0, tellsShown));
  protected readonly moreTells = computed(() => this.report().tells.length - tellsShown);
  protected readonly channel = computed(() => channelWords(this.report().channel));
  protected readonly forClubsOnly = computed(() => this.report().audience !== 'public');
}
