import { randomBytes } from 'node:crypto';
import { mkdir, readFile, rename, rm, writeFile } from 'node:fs/promises';
import { dirname, join } from 'node:path';

/** Where the bytes of photos lie: by random key, knowing nothing of reports. */
export interface PhotoStore {
  put(key: string, bytes: Uint8Array): Promise<void>;
  /** Undefined where there is nothing under the key. */
  get(key: string): Promise<Buffer | undefined>;
  /** Removing what is not there is no error. */
  remove(key: string): Promise<void>;
}

/** 128 random bits: a key tells nothing of the photo and can't be guessed. */
export function newObjectKey(): string {
  return randomBytes(16).toString('hex');
}

/** The folders that server and worker share: what is kept, and what is on its way. */
export function openPhotoFolders(
  directory: string,
): { readonly store: PhotoStore; readonly incoming: string } {
  return { store: createDiskPhotoStore(join(directory, 'kept')),
    incoming: join(directory, 'incoming') };
}

/** Files below `root`, in folders of two levels so that none grows large. */
export function createDiskPhotoStore(root: string): PhotoStore {
  function pathOf(key: string): string {
    if (!/^[0-9a-f]{32}$/.test(key)) throw new Error('not an object key');
    return join(root, key.slice(0, 2), key.slice(2, 4), key);
  }
  return {
    async put(key, bytes) {
      const path = pathOf(key);
      const unfinished = `${path}.${randomBytes(4).toString('hex')}.part`;
      await mkdir(dirname(path), { recursive: true, mode: 0o700 });
      // A reader finds the whole file or none.
      await writeFile(unfinished, bytes, { mode: 0o600, flush: true });
      await rename(unfinished, path);
    },
    async get(key) {
      try {
        return await readFile(pathOf(key));
      } catch (error) {
        if (error instanceof Error && 'code' in error && error.code === 'ENOENT') return undefined;
        throw error;
      }
    },
    remove: (key) => rm(pathOf(key), { force: true }),
  };
}
