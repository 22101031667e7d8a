import { TaxonomyView, TellView } from '#shared/catalogue/coin-type-view';
import { UploadedPhoto } from '#shared/reports/photo';
import { DraftView } from '#shared/reports/report-content';

import { FilingContent, draftOf, emptyContent } from './filing-content';

/** A whole report of a crown with two photos, one tell and its pin. For specs. */
export function filingContent(change: Partial<FilingContent> = {}): FilingContent {
  const empty = emptyContent('larkmoor');
  const circle = { x: 0.5, y: 0.5, radius: 0.4 };
  return {
    ...empty,
    presentedAs: {
      ...empty.presentedAs,
      coinType: 'quillhaven-crown',
      metal: 'silver',
      year: 1887,
    },
    photos: [
      { photoId: 'photo-1', side: 'obverse', circle, uprightDegrees: 0, caption: '' },
      { photoId: 'photo-2', side: 'reverse', circle, uprightDegrees: 0, caption: '' },
    ],
    tells: [
      {
        tellId: 'rounded-pits',
        note: '',
        disclosure: 'public',
        pins: [
          {
            id: 'pin-1',
            photoId: 'photo-1',
            note: '',
            place: { side: 'obverse', clockHours: 3, radiusFraction: 0.5 },
          },
        ],
      },
    ],
    surfacing: {
      ...empty.surfacing,
      channel: 'coin_show',
      surfacedOn: '2026-10',
      country: 'GB',
    },
    ...change,
  };
}

export function draftView(revision = 1, content = filingContent()): DraftView {
  return {
    id: 'draft-1',
    revision,
    content: draftOf(content),
    updatedAt: '2026-11-27T10:42:00Z',
  };
}

export function uploadedPhoto(id: string): UploadedPhoto {
  return { id, width: 1000, height: 1000, blurs: [] };
}

/** Two methods, three tells, one genuine feature that looks like a tell. */
export function taxonomyView(): TaxonomyView {
  const cast = { id: 'cast', name: 'Cast' };
  const struck = { id: 'transfer-die', name: 'Struck from transfer dies' };
  const crack = { id: 'die-crack', seen: 'A raised line from a crack in the die.' };
  const tell = (id: string, name: string, method: typeof cast): TellView => ({
    id,
    name,
    seen: `${name}, as seen.`,
    place: 'any',
    form: 'raised',
    methods: [method],
    confusedWith: [crack],
    disclosure: 'public',
  });
  return {
    methods: [cast, struck],
    genuineFeatures: [crack],
    tells: [
      tell('rounded-pits', 'Rounded pits', cast),
      tell('edge-seam', 'Seam on the edge', cast),
      { ...tell('tool-mark', 'Raised tool mark', struck), disclosure: 'clubs' },
    ],
  };
}
