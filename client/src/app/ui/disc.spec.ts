import { TestBed } from '@angular/core/testing';

import { Disc, DiscPhoto, discFrame } from './disc';
import { PhotoViewer } from './photo-viewer';

const photo: DiscPhoto = {
  id: 'a1',
  width: 1200,
  height: 900,
  side: 'obverse',
  circle: { x: 0.5, y: 0.52, radius: 0.34 },
  uprightDegrees: 12,
};

describe('discFrame', () => {
  it('brings the circle to the square: its centre to the middle, its rim to the border', () => {
    const frame = discFrame(photo);
    const heightPercent = frame.widthPercent * (photo.height / photo.width);
    expect(frame.leftPercent + 0.5 * frame.widthPercent).toBeCloseTo(50);
    expect(frame.topPercent + 0.52 * heightPercent).toBeCloseTo(50);
    expect(0.34 * frame.widthPercent).toBeCloseTo(50);
  });

  it('turns the coin back to upright about its own centre', () => {
    expect(discFrame(photo)).toMatchObject({ turn: 'rotate(-12deg)', origin: '50% 52%' });
  });

  it('leaves a photo without a circle whole', () => {
    expect(discFrame({ ...photo, circle: null })).toMatchObject({ widthPercent: 100 });
  });
});

describe('Disc', () => {
  function draw(whole: boolean): { element: HTMLElement; opened: string[] } {
    const opened: string[] = [];
    const viewer: Pick<PhotoViewer, 'open'> = {
      open: async ({ id }) => {
        opened.push(id);
      },
    };
    TestBed.configureTestingModule({ providers: [{ provide: PhotoViewer, useValue: viewer }] });
    const fixture = TestBed.createComponent(Disc);
    fixture.componentRef.setInput('photo', photo);
    fixture.componentRef.setInput('whole', whole);
    fixture.detectChanges();
    return { element: fixture.nativeElement as HTMLElement, opened };
  }

  it('says which side it shows and offers every size', () => {
    const image = draw(false).element.querySelector('img');
    expect(image?.alt).toContain('obverse');
    expect(image?.getAttribute('srcset')).toBe(
      '/api/photos/a1/small.webp 320w, /api/photos/a1/medium.webp 800w, ' +
        '/api/photos/a1/large.webp 1600w',
    );
  });

  it('has the whole picture one tap away, where asked', () => {
    const { element, opened } = draw(true);
    element.querySelector('button')?.click();
    expect(opened).toEqual(['a1']);
    TestBed.resetTestingModule();
    expect(draw(false).element.querySelector('button')).toBeNull();
  });
});
