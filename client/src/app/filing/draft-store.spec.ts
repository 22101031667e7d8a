import { provideHttpClient } from '@angular/common/http';
import {
  HttpTestingController,
  TestRequest,
  provideHttpClientTesting,
} from '@angular/common/http/testing';
import { TestBed } from '@angular/core/testing';
import { afterEach, beforeEach, describe, expect, it, vi } from 'vitest';
import { DraftSave } from '#shared/reports/report-content';

import { BROWSER_STORAGE } from '../ui/browser-storage';
import { DraftStore, firstRetryTime, quietTime } from './draft-store';
import { draftView, filingContent } from './filing-factory';

const stale = { type: 'about:blank', title: '', status: 409, code: 'stale_version' };

describe('DraftStore', () => {
  let kept: Map<string, string>;
  let http: HttpTestingController;
  let store: DraftStore;

  function openStore(): DraftStore {
    TestBed.resetTestingModule();
    TestBed.configureTestingModule({
      providers: [
        provideHttpClient(),
        provideHttpClientTesting(),
        DraftStore,
        {
          provide: BROWSER_STORAGE,
          useValue: {
            getItem: (key: string) => kept.get(key) ?? null,
            setItem: (key: string, value: string) => kept.set(key, value),
            removeItem: (key: string) => kept.delete(key),
          },
        },
      ],
    });
    http = TestBed.inject(HttpTestingController);
    return TestBed.inject(DraftStore);
  }

  function write(account: string): void {
    store.update({ account });
  }

  function save(): TestRequest {
    return http.expectOne({ method: 'PUT', url: '/api/drafts/draft-1' });
  }

  function accountOf({ request }: TestRequest): string | undefined {
    return (request.body as DraftSave).content.account;
  }

  beforeEach(() => {
    vi.useFakeTimers();
    kept = new Map();
    store = openStore();
    store.open('draft-1', 'larkmoor', draftView(4));
  });

  afterEach(() => {
    http.verify();
    vi.useRealTimers();
  });

  it('saves once, when the typing rests, on the revision that it read', () => {
    write('It');
    vi.advanceTimersByTime(quietTime - 1);
    write('It lay');
    vi.advanceTimersByTime(quietTime - 1);
    http.expectNone('/api/drafts/draft-1');
    expect(store.saveState()).toBe('unsaved');
    vi.advanceTimersByTime(1);
    const request = save();
    expect(request.request.body).toMatchObject({ revision: 4, content: { account: 'It lay' } });
    request.flush({ ...draftView(5), updatedAt: '2026-11-27T10:43:00Z' });
    expect(store.saveState()).toBe('saved');
    expect(store.savedAt()?.toISOString()).toBe('2026-11-27T10:43:00.000Z');
    expect([...kept.keys()]).toEqual([]);
  });

  it('saves again what was typed while a save was under way', () => {
    write('One');
    vi.advanceTimersByTime(quietTime);
    const first = save();
    write('One, two');
    first.flush(draftView(5));
    expect(store.saveState()).toBe('unsaved');
    vi.advanceTimersByTime(quietTime);
    const second = save();
    expect(second.request.body).toMatchObject({ revision: 5, content: { account: 'One, two' } });
    second.flush(draftView(6));
    expect(store.saveState()).toBe('saved');
  });

  it('keeps it in the browser without a line, and tries again with growing pauses', () => {
    write('On the train');
    vi.advanceTimersByTime(quietTime);
    save().error(new ProgressEvent('offline'));
    expect(store.saveState()).toBe('unsaved');
    expect([...kept.values()].join()).toContain('On the train');

    vi.advanceTimersByTime(firstRetryTime);
    save().error(new ProgressEvent('offline'));
    vi.advanceTimersByTime(2 * firstRetryTime - 1);
    http.expectNone('/api/drafts/draft-1');
    vi.advanceTimersByTime(1);
    save().flush(draftView(5));
    expect(store.saveState()).toBe('saved');
    expect(store.saveProblem()).toBeNull();
    expect([...kept.keys()]).toEqual([]);
  });

  it('does not try again what the server refuses for good, but keeps it and says so', () => {
    write('Too much');
    vi.advanceTimersByTime(quietTime);
    save().flush({ type: 'about:blank', title: '', status: 401, code: 'not_signed_in' },
      { status: 401, statusText: 'Unauthorized' });
    vi.advanceTimersByTime(120_000);
    http.expectNone('/api/drafts/draft-1');
    expect(store.saveProblem()?.code).toBe('not_signed_in');
    expect([...kept.values()].join()).toContain('Too much');
  });

  it('goes on after a crash with what the browser kept, and saves it', () => {
    write('Before the crash');
    store = openStore();
    store.open('draft-1', 'larkmoor', draftView(4));
    expect(store.content().account).toBe('Before the crash');
    vi.advanceTimersByTime(quietTime);
    const request = save();
    expect(accountOf(request)).toBe('Before the crash');
    request.flush(draftView(5));
  });

  describe('saved in another tab meanwhile', () => {
    beforeEach(() => {
      write('Mine');
      vi.advanceTimersByTime(quietTime);
      save().flush(stale, { status: 409, statusText: 'Conflict' });
      http.expectOne({ method: 'GET', url: '/api/drafts/draft-1' })
        .flush(draftView(9, filingContent({ account: 'Theirs' })));
    });

    it('asks which is to go on, and saves nothing until then', () => {
      expect(store.saveState()).toBe('stale');
      write('Mine, longer');
      vi.advanceTimersByTime(60_000);
      http.expectNone('/api/drafts/draft-1');
      expect(store.content().account).toBe('Mine, longer');
    });

    it('saves mine over the other, which stays at hand', () => {
      store.keepMine();
      vi.advanceTimersByTime(0);
      const request = save();
      expect(request.request.body).toMatchObject({ revision: 9, content: { account: 'Mine' } });
      request.flush(draftView(10));
      expect(store.setAside()?.account).toBe('Theirs');
    });

    it('takes the other; mine stays at hand and can be gone back to', () => {
      store.takeOther();
      expect(store.content().account).toBe('Theirs');
      expect(store.saveState()).toBe('saved');
      store.changeToSetAside();
      expect(store.content().account).toBe('Mine');
      vi.advanceTimersByTime(quietTime);
      const request = save();
      expect(request.request.body).toMatchObject({ revision: 9, content: { account: 'Mine' } });
      request.flush(draftView(10));
    });
  });

  it('saves no filed report as a draft, but keeps its changes until it is sent', () => {
    store.openFiled('TN-26-00121-K', 3, filingContent());
    write('As asked');
    vi.advanceTimersByTime(60_000);
    http.expectNone(() => true);
    expect(store.saveState()).toBe('unsaved');
    store = openStore();
    store.openFiled('TN-26-00121-K', 3, filingContent());
    expect(store.content().account).toBe('As asked');
    store.openFiled('TN-26-00121-K', 4, filingContent({ account: 'Changed since' }));
    expect(store.content().account).toBe('Changed since');
  });

  it('saves nothing more once the report is sent', () => {
    write('Sent');
    store.close();
    vi.advanceTimersByTime(60_000);
    http.expectNone(() => true);
    expect([...kept.keys()]).toEqual([]);
  });

  it('undoes a drag as one step, and leaves the other answers alone', () => {
    const [obverse, reverse] = store.content().photos;
    if (!obverse || !reverse) throw new Error('two photos are needed');
    store.beginGesture();
    for (const uprightDegrees of [10, 20, 30]) {
      store.update({ photos: [{ ...obverse, uprightDegrees }, reverse] });
    }
    store.endGesture();
    write('Typed after');
    store.undo();
    expect(store.content().photos[0]?.uprightDegrees).toBe(0);
    expect(store.content().account).toBe('Typed after');
    expect(store.canUndo()).toBe(false);
    store.redo();
    expect(store.content().photos[0]?.uprightDegrees).toBe(30);
    vi.advanceTimersByTime(quietTime);
    save().flush(draftView(5));
  });
});
