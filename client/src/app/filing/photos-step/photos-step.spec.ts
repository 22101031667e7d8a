import { HarnessLoader } from '@angular/cdk/testing';
import { TestbedHarnessEnvironment } from '@angular/cdk/testing/testbed';
import { HttpEventType, provideHttpClient } from '@angular/common/http';
import { HttpTestingController, provideHttpClientTesting } from '@angular/common/http/testing';
import { ComponentFixture, TestBed } from '@angular/core/testing';
import { MatAutocompleteHarness } from '@angular/material/autocomplete/testing';
import { beforeEach, describe, expect, it } from 'vitest';

import { BROWSER_STORAGE } from '../../ui/browser-storage';
import { NEW_ID } from '../../ui/new-id';
import { DraftStore } from '../draft-store';
import { FilingContent, emptyContent } from '../filing-content';
import { draftView, filingContent, taxonomyView, uploadedPhoto } from '../filing-factory';
import { PhotoShelf } from '../photo-shelf';
import { PhotosStep } from './photos-step';

describe('PhotosStep', () => {
  let fixture: ComponentFixture<PhotosStep>;
  let http: HttpTestingController;
  let loader: HarnessLoader;
  let page: HTMLElement;
  let store: DraftStore;

  async function open(content: FilingContent): Promise<void> {
    let made = 0;
    TestBed.configureTestingModule({
      providers: [
        provideHttpClient(),
        provideHttpClientTesting(),
        DraftStore,
        PhotoShelf,
        { provide: BROWSER_STORAGE, useValue: null },
        { provide: NEW_ID, useValue: () => `new-${(made += 1)}` },
      ],
    });
    http = TestBed.inject(HttpTestingController);
    store = TestBed.inject(DraftStore);
    store.open('draft-1', 'larkmoor', draftView(1, content));
    fixture = TestBed.createComponent(PhotosStep);
    page = fixture.nativeElement;
    loader = TestbedHarnessEnvironment.loader(fixture);
    await fixture.whenStable();
  }

  async function openReady(content = filingContent()): Promise<void> {
    await open(content);
    http.expectOne('/api/tells').flush(taxonomyView());
    for (const { photoId } of content.photos) {
      http.expectOne(`/api/photos/${photoId}`).flush(uploadedPhoto(photoId));
    }
    await fixture.whenStable();
  }

  function labelled<Kind extends HTMLElement>(start: string): Kind {
    const found = [...page.querySelectorAll<Kind>('[aria-label]')].find((each) =>
      each.getAttribute('aria-label')?.startsWith(start));
    if (!found) throw new Error(`nothing is labelled ${start}`);
    return found;
  }

  function button(words: string): HTMLButtonElement {
    const found = [...page.querySelectorAll('button')].find((each) =>
      each.textContent?.includes(words));
    if (!found) throw new Error(`no button says ${words}`);
    return found;
  }

  function press(target: Element, key: string, shiftKey = false): void {
    target.dispatchEvent(
      new KeyboardEvent('keydown', { key, shiftKey, bubbles: true, cancelable: true }));
  }

  const pin = () => store.content().tells[0]?.pins[0];
  const fields = () => [...page.querySelectorAll<HTMLInputElement>('tn-pin-row input')];

  it('moves a pin by arrow keys as they point, and takes it away by Delete', async () => {
    await openReady();
    const mark = labelled('Pin 1');
    press(mark, 'ArrowRight');
    expect(pin()?.place).toEqual({ side: 'obverse', clockHours: 3, radiusFraction: 0.51 });
    await fixture.whenStable();
    press(labelled('Pin 1'), 'ArrowUp', true);
    await fixture.whenStable();
    expect(pin()?.place).toMatchObject({ clockHours: 2.81, radiusFraction: 0.512 });
    expect(fields().map(({ value }) => value)).toEqual(['2:49', '0.512']);
    press(labelled('Pin 1'), 'Delete');
    expect(pin()).toBeUndefined();
  });

  it('edits the same pin by numbers in the list, and shows it there on the photo', async () => {
    await openReady();
    const [clock, fraction] = fields();
    if (!clock || !fraction) throw new Error('the pin has no fields');
    expect(clock.value).toBe('3:00');
    clock.value = '12:30';
    clock.dispatchEvent(new Event('change'));
    await fixture.whenStable();
    fraction.value = '1';
    fraction.dispatchEvent(new Event('change'));
    await fixture.whenStable();
    expect(pin()?.place).toEqual({ side: 'obverse', clockHours: 0.5, radiusFraction: 1 });
    // Half an hour is 15 degrees; the circle is centred with a radius of 40 % of the width.
    const mark = labelled('Pin 1');
    expect(Number.parseFloat(mark.style.left)).toBeCloseTo(50 + 40 * Math.sin(Math.PI / 12), 3);
    expect(Number.parseFloat(mark.style.top)).toBeCloseTo(50 - 40 * Math.cos(Math.PI / 12), 3);
    button('Undo').click();
    expect(pin()?.place).toMatchObject({ radiusFraction: 0.5 });
  });

  it('names a tell from the list by search, and sets its pin without the photo', async () => {
    await openReady({ ...filingContent(), tells: [] });
    expect(page.textContent).toContain('No tell is named yet');
    const search = await loader.getHarness(MatAutocompleteHarness);
    await search.enterText('tool');
    const groups = await search.getOptionGroups();
    expect(await Promise.all(groups.map((group) => group.getLabelText())))
      .toEqual(['Struck from transfer dies']);
    await search.selectOption({ text: /Raised tool mark/ });
    button('Add a pin without tapping').click();
    await fixture.whenStable();
    expect(store.content().tells).toEqual([{
      tellId: 'tool-mark', note: '', disclosure: 'clubs',
      pins: [{ id: 'new-1', photoId: 'photo-1', note: '',
        place: { side: 'obverse', clockHours: 0, radiusFraction: 0.5 } }],
    }]);
    const who = [...page.querySelectorAll('option')].map(({ value }) => value);
    expect(who, 'nobody widens what the taxonomy narrows').not.toContain('public');
  });

  it('holds a pin of the edge by angle and height', async () => {
    await openReady();
    const shows = page.querySelector<HTMLSelectElement>('#field-obverse');
    if (!shows) throw new Error('the side has no field');
    shows.value = 'edge';
    shows.dispatchEvent(new Event('change'));
    await fixture.whenStable();
    expect(pin(), 'a pin of the face does not fit the edge').toBeUndefined();
    expect(store.content().photos[0]).toMatchObject({ side: 'edge', circle: null });
    button('Add a pin without tapping').click();
    await fixture.whenStable();
    const [angle] = fields();
    if (!angle) throw new Error('the pin has no fields');
    angle.value = '359.97';
    angle.dispatchEvent(new Event('change'));
    await fixture.whenStable();
    expect(pin()?.place).toEqual({ side: 'edge', angleDegrees: 0, heightFraction: 0.5 });
  });

  it('warns where a feature of genuine pieces is described as a tell', async () => {
    await openReady();
    const search = await loader.getHarness(MatAutocompleteHarness);
    await search.enterText('die crack');
    expect(page.querySelector('tn-tell-editor [role=status]')?.textContent)
      .toContain('genuine pieces show this too');
  });

  it('moves the circle by keyboard and by numbers', async () => {
    await openReady();
    press(labelled('Top of the coin'), 'ArrowRight', true);
    press(labelled('Rim of the coin'), 'ArrowRight');
    expect(store.content().photos[0]).toMatchObject({
      uprightDegrees: 5, circle: { x: 0.5, y: 0.5, radius: 0.404 } });
    const across = page.querySelector<HTMLInputElement>('tn-circle-fields input');
    if (!across) throw new Error('the circle has no fields');
    across.value = '48.5';
    across.dispatchEvent(new Event('change'));
    expect(store.content().photos[0]?.circle?.x).toBe(0.485);
  });

  it('blurs a part given by numbers, on the server', async () => {
    await openReady();
    button('Blur parts').click();
    await fixture.whenStable();
    button('Add a blurred part by numbers').click();
    const request = http.expectOne('/api/photos/photo-1/blurs');
    const blurs = [{ x: 0.4, y: 0.8, width: 0.2, height: 0.1 }];
    expect(request.request.body).toEqual({ blurs });
    request.flush({ ...uploadedPhoto('photo-1'), blurs });
    await fixture.whenStable();
    expect(labelled('Blurred part 1').querySelectorAll('input')).toHaveLength(4);
    expect(page.querySelector('tn-blur-editor img')?.getAttribute('src')).toContain('0.4-0.8');
  });

  it('says why the tells or a photo cannot be shown, and tries again', async () => {
    await open(filingContent());
    http.expectOne('/api/tells').flush(null, { status: 500, statusText: 'Broken' });
    http.expectOne('/api/photos/photo-1').flush(null, { status: 500, statusText: 'Broken' });
    http.expectOne('/api/photos/photo-2').flush(uploadedPhoto('photo-2'));
    await fixture.whenStable();
    expect(page.querySelectorAll('[role=alert]')).toHaveLength(2);
    for (const retry of [...page.querySelectorAll('button')].filter((each) =>
      each.textContent?.includes('Try again'))) retry.click();
    http.expectOne('/api/tells').flush(taxonomyView());
    http.expectOne('/api/photos/photo-1').flush(uploadedPhoto('photo-1'));
    await fixture.whenStable();
    expect(page.querySelector('[role=alert]')).toBeNull();
  });

  describe('photos that are added', () => {
    const jpeg = (name: string, width = 4000, height = 3000) =>
      new File([Uint8Array.from([0xff, 0xd8, 0xff, 0xc0, 0, 17, 8, height >> 8, height & 255,
        width >> 8, width & 255, 3, 0, 0, 0])], name, { type: 'image/jpeg' });
    const take = async (...files: File[]): Promise<void> => {
      await TestBed.inject(PhotoShelf).take(files);
      await fixture.whenStable();
    };

    beforeEach(async () => {
      await openReady(emptyContent('larkmoor'));
    });

    it('go one after the other with a bar each, become obverse, reverse and details', async () => {
      await take(jpeg('a.jpg'), jpeg('b.jpg'), jpeg('c.jpg'));
      const bars = page.querySelectorAll('tn-photo-uploader progress');
      expect([...bars].map((bar) => bar.getAttribute('aria-label')))
        .toEqual(['Sending a.jpg', 'Sending b.jpg', 'Sending c.jpg']);
      for (const id of ['new-1', 'new-2', 'new-3']) {
        const request = http.expectOne('/api/photos');
        expect((request.request.body as FormData).get('id')).toBe(id);
        request.event({ type: HttpEventType.UploadProgress, loaded: 1, total: 4 });
        await fixture.whenStable();
        expect(page.querySelector('tn-photo-uploader')?.textContent).toContain('25 %');
        request.flush(uploadedPhoto(id));
        await fixture.whenStable();
      }
      expect(store.content().photos.map(({ photoId, side, circle }) =>
        [photoId, side, circle?.radius])).toEqual([
        ['new-1', 'obverse', 0.45], ['new-2', 'reverse', 0.45], ['new-3', 'detail', undefined],
      ]);
    });

    it('are refused with the reason before they are sent', async () => {
      await take(new File(['<svg/>'], 'coin.png', { type: 'image/png' }),
        jpeg('wide.jpg', 10_000, 6_001));
      http.expectNone('/api/photos');
      const reasons = [...page.querySelectorAll('[role=alert]')].map((each) => each.textContent);
      expect(reasons).toEqual(['This is no JPEG, PNG or WebP picture.',
        'It has more than 60 million pixels. Save it smaller and try again.']);
      expect(page.textContent).not.toContain('Try again');
    });

    it('can be sent again under the same id where the server failed', async () => {
      await take(jpeg('a.jpg'));
      http.expectOne('/api/photos').flush(null, { status: 500, statusText: 'Broken' });
      await fixture.whenStable();
      button('Try again').click();
      const request = http.expectOne('/api/photos');
      expect((request.request.body as FormData).get('id')).toBe('new-1');
      fixture.destroy();
      request.flush(uploadedPhoto('new-1'));
      expect(store.content().photos, 'it arrives on another step as well').toHaveLength(1);
    });
  });
});
