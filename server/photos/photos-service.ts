import { mkdir, mkdtemp, readFile, rm, writeFile } from 'node:fs/promises';
import { join } from 'node:path';
import type { BlurArea, UploadedPhoto } from '#shared/reports/photo';
import { system, visitor, type Actor, type Database } from '../db/database';
import { Conflict, NotFound } from '../errors';
import type { DecodedPhoto } from '../images/decoder-messages';
import type { PhotoDecoder } from '../images/photo-decoder';
import { newObjectKey, type PhotoStore } from '../images/photo-store';
import * as repository from './photos-repository';
import type { OwnPhoto, StoredRendition } from './photos-repository';

export interface PhotoFile {
  readonly bytes: Buffer;
  /** Changes whenever the picture does. */
  readonly tag: string;
  readonly isPublic: boolean;
}

export type PhotosService = ReturnType<typeof createPhotosService>;

/**
 * Receives, blurs, serves and removes photos. It opens its transactions itself, since decoding and
 * storing lie between them and never inside one.
 */
export function createPhotosService(parts: {
  readonly database: Database; readonly store: PhotoStore; readonly decoder: PhotoDecoder;
  /** Folder for what is on its way; each file in it lives no longer than its request. */
  readonly incoming: string;
}) {
  const { database, store, decoder, incoming } = parts;

  return {
    /** Keeps the photo at `source`. Sent again with the same id, answers what is kept. */
    async receive(
      ownerId: string, id: string, source: string,
    ): Promise<{ readonly photo: UploadedPhoto; readonly isNew: boolean }> {
      const owner: Actor = { kind: 'person', id: ownerId };
      const find = (): Promise<OwnPhoto | undefined> => database.asActor(owner,
        (trx) => repository.findOwnPhoto(trx, ownerId, id));
      const before = await find();
      if (before) return { photo: toUploaded(before), isNew: false };
      return inFolder(async (directory) => {
        const decoded = await decoder.decode({ kind: 'receive', source, directory });
        const masterKey = newObjectKey();
        const renditions = await keep(decoded, masterKey);
        const isNew = await dropUnless(
          [masterKey, ...renditions.map((rendition) => rendition.objectKey)],
          () => database.asActor(owner, (trx) => repository.addPhoto(trx, {
            ...decoded, id, ownerId, masterKey, renditions,
          })));
        const photo = await find();
        if (!photo) throw new Conflict('photo_in_use');
        return { photo: toUploaded(photo), isNew };
      });
    },

    async view(actor: Actor, ownerId: string, id: string): Promise<UploadedPhoto> {
      return toUploaded(await getOwn(actor, ownerId, id));
    },

    /** Renders the photo anew from its master. 409 `photo_in_use` once it is filed. */
    async blur(
      actor: Actor, ownerId: string, id: string, blurs: readonly BlurArea[],
    ): Promise<UploadedPhoto> {
      const photo = await getOwn(actor, ownerId, id);
      if (photo.isFixed) throw new Conflict('photo_in_use');
      return inFolder(async (directory) => {
        const master = await store.get(photo.masterKey);
        if (!master) throw new Error(`the master of photo ${id} is not in the store`);
        const path = join(directory, 'master.jpeg');
        await writeFile(path, master);
        const decoded = await decoder.decode({ kind: 'render', master: path, directory, blurs });
        const renditions = await keep(decoded, null);
        const replaced: string[] = [];
        await dropUnless(renditions.map((rendition) => rendition.objectKey),
          () => database.asActor(actor, async (trx) => {
            const now = await repository.findOwnPhoto(trx, ownerId, id, true);
            if (!now) throw new NotFound();
            if (now.isFixed) throw new Conflict('photo_in_use');
            replaced.push(...await repository.replaceRenditions(trx, id, blurs, renditions));
            return true;
          }));
        await drop(replaced);
        return { id, width: photo.width, height: photo.height, blurs };
      });
    },

    /** 409 `photo_in_use` once any report shows it. */
    async remove(actor: Actor, ownerId: string, id: string): Promise<void> {
      await database.asActor(actor, async (trx) => {
        const photo = await repository.findOwnPhoto(trx, ownerId, id, true);
        if (!photo) throw new NotFound();
        if (photo.isUsed) throw new Conflict('photo_in_use');
        await repository.markRemoved(trx, id);
      });
      await forget(id);
    },

    /** The picture where the actor may see it. What a visitor may see is public. */
    async file(actor: Actor, id: string, name: string): Promise<PhotoFile> {
      const [size = '', format = ''] = name.split('.');
      const find = (reader: Actor): Promise<string | undefined> => database.asActor(reader,
        (trx) => repository.findRenditionKey(trx, id, size, format));
      const publicKey = await find(visitor);
      const key = publicKey ?? (actor.kind === 'visitor' ? undefined : await find(actor));
      const bytes = key === undefined ? undefined : await store.get(key);
      if (key === undefined || !bytes) throw new NotFound();
      return { bytes, tag: `"${key}"`, isPublic: publicKey !== undefined };
    },

    /**
     * Removes photos that no report and no draft has shown for a week, and what an interrupted
     * removal left. For the worker; returns how many.
     */
    async removeUnused(limit = 200): Promise<number> {
      const ids = await database.asActor(system, async (trx) => {
        const unused = await repository.listUnusedPhotos(trx, 7, limit);
        for (const id of unused) await repository.markRemoved(trx, id);
        return unused;
      });
      for (const id of ids) await forget(id);
      return ids.length;
    },
  };

  async function getOwn(actor: Actor, ownerId: string, id: string): Promise<OwnPhoto> {
    const photo = await database.asActor(actor,
      (trx) => repository.findOwnPhoto(trx, ownerId, id));
    if (!photo) throw new NotFound();
    return photo;
  }

  /** The rows of the renditions go last: while they stand, the clean-up finds the photo again. */
  async function forget(id: string): Promise<void> {
    await drop(await database.asActor(system, (trx) => repository.listObjectKeys(trx, id)));
    await database.asActor(system, (trx) => repository.removeRenditions(trx, id));
  }

  async function keep(decoded: DecodedPhoto, masterKey: string | null): Promise<StoredRendition[]> {
    if (masterKey) await store.put(masterKey, await readFile(decoded.master));
    const kept: StoredRendition[] = [];
    for (const { path, ...rendition } of decoded.renditions) {
      const objectKey = newObjectKey();
      await store.put(objectKey, await readFile(path));
      kept.push({ ...rendition, objectKey });
    }
    return kept;
  }

  async function drop(keys: readonly string[]): Promise<void> {
    await Promise.all(keys.map((key) => store.remove(key)));
  }

  /** What `work` did not take up is removed from the store again. */
  async function dropUnless(
    keys: readonly string[], work: () => Promise<boolean>,
  ): Promise<boolean> {
    try {
      const isTaken = await work();
      if (!isTaken) await drop(keys);
      return isTaken;
    } catch (error) {
      await drop(keys);
      throw error;
    }
  }

  async function inFolder<Result>(work: (directory: string) => Promise<Result>): Promise<Result> {
    await mkdir(incoming, { recursive: true, mode: 0o700 });
    const directory = await mkdtemp(join(incoming, 'photo-'));
    try {
      return await work(directory);
    } finally {
      await rm(directory, { recursive: true, force: true });
    }
  }
}

function toUploaded({ id, width, height, blurs }: UploadedPhoto): UploadedPhoto {
  return { id, width, height, blurs };
}
