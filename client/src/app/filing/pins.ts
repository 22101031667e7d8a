import { FacePlace, Pin, PinPlace, ReportTell } from '#shared/reports/report-content';

type Tells = readonly ReportTell[];

/** The tells with one more pin of the tell at `at`. */
export function withPin(tells: Tells, at: number, pin: Pin): Tells {
  return tells.map((tell, index) =>
    index === at ? { ...tell, pins: [...tell.pins, pin] } : tell,
  );
}

export function withPinMoved(tells: Tells, id: string, place: PinPlace): Tells {
  return withPins(tells, (pin) => [pin.id === id ? { ...pin, place } : pin]);
}

export function withoutPin(tells: Tells, id: string): Tells {
  return withPins(tells, (pin) => (pin.id === id ? [] : [pin]));
}

/** The tells without the pins that stood on a photo which is gone. */
export function withoutPhoto(tells: Tells, photoId: string): Tells {
  return withPins(tells, (pin) => (pin.photoId === photoId ? [] : [pin]));
}

/** After a photo was said to show another side: its pins go along, or go where none fits. */
export function withSideOfPhoto(
  tells: Tells,
  photoId: string,
  side: FacePlace['side'] | 'edge' | null,
): Tells {
  return withPins(tells, (pin) => {
    if (pin.photoId !== photoId || pin.place.side === side) return [pin];
    return side === null || side === 'edge' || pin.place.side === 'edge'
      ? []
      : [{ ...pin, place: { ...pin.place, side } }];
  });
}

function withPins(tells: Tells, change: (pin: Pin) => readonly Pin[]): Tells {
  return tells.map((tell) => ({ ...tell, pins: tell.pins.flatMap(change) }));
}
