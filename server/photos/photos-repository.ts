import type { BlurArea, RenditionSize, UploadedPhoto } from '#shared/reports/photo';
import type { Transaction } from '../db/database';

export interface StoredRendition {
  readonly size: RenditionSize;
  readonly format: 'webp' | 'jpeg';
  readonly objectKey: string;
  readonly width: number;
  readonly height: number;
  readonly bytes: number;
}

export interface OwnPhoto extends UploadedPhoto {
  readonly masterKey: string;
  /** True where a report shows it that is not back with the reporter for changes. */
  readonly isFixed: boolean;
  /** True where any version of any report shows it. */
  readonly isUsed: boolean;
}

/** The actor's own photo; with `lock`, held until the transaction ends. */
export async function findOwnPhoto(
  trx: Transaction, ownerId: string, id: string, lock = false,
): Promise<OwnPhoto | undefined> {
  const { rows: [row] } = await trx.raw(
    `select p.id, p.width, p.height, p.blurs, p.master_key as "masterKey",
       exists (select from report_photo rp where rp.photo_id = p.id) as "isUsed",
       exists (select from report_photo rp join report r on r.id = rp.report_id
         where rp.photo_id = p.id and r.state <> 'returned') as "isFixed"
     from photo p where p.id = ? and p.owner_id = ? and p.removed_at is null
     ${lock ? 'for update of p' : ''}`, [id, ownerId]);
  return row;
}

/** False where there is a photo of that id already. */
export async function addPhoto(trx: Transaction, photo: {
  readonly id: string; readonly ownerId: string; readonly masterKey: string;
  readonly sha256: string; readonly bytesReceived: number; readonly width: number;
  readonly height: number; readonly renditions: readonly StoredRendition[];
}): Promise<boolean> {
  const { rowCount } = await trx.raw(
    `insert into photo (id, owner_id, master_key, sha256, bytes_received, width, height)
     values (?, ?, ?, decode(?, 'hex'), ?, ?, ?) on conflict do nothing`,
    [photo.id, photo.ownerId, photo.masterKey, photo.sha256, photo.bytesReceived, photo.width,
      photo.height]);
  if (!rowCount) return false;
  await addRenditions(trx, photo.id, photo.renditions);
  return true;
}

/** Puts other renditions in place of those that are; returns the keys that nothing shows now. */
export async function replaceRenditions(
  trx: Transaction, id: string, blurs: readonly BlurArea[],
  renditions: readonly StoredRendition[],
): Promise<string[]> {
  const before = await removeRenditions(trx, id);
  await addRenditions(trx, id, renditions);
  await trx('photo').where({ id }).update({ blurs: JSON.stringify(blurs) });
  return before;
}

/** Deletes the rows of the renditions; returns the keys of their objects. */
export async function removeRenditions(trx: Transaction, id: string): Promise<string[]> {
  const rows = await trx('photo_rendition').where({ photo_id: id }).delete()
    .returning('object_key');
  return rows.map((row: { object_key: string }) => row.object_key);
}

export async function listObjectKeys(trx: Transaction, id: string): Promise<string[]> {
  const { rows } = await trx.raw(
    `select master_key as key from photo where id = ?
     union all select object_key from photo_rendition where photo_id = ?`, [id, id]);
  return rows.map((row: { key: string }) => row.key);
}

export async function markRemoved(trx: Transaction, id: string): Promise<void> {
  await trx('photo').where({ id }).update({ removed_at: trx.fn.now() });
}

async function addRenditions(
  trx: Transaction, id: string, renditions: readonly StoredRendition[],
): Promise<void> {
  await trx('photo_rendition').insert(renditions.map((rendition) => ({
    photo_id: id, size: rendition.size, format: rendition.format,
    object_key: rendition.objectKey, width: rendition.width, height: rendition.height,
    bytes: rendition.bytes,
  })));
}

/** The object of one rendition, where the actor may see the photo. */
export async function findRenditionKey(
  trx: Transaction, id: string, size: string, format: string,
): Promise<string | undefined> {
  const row = await trx('photo_rendition').join('photo', 'photo.id', 'photo_rendition.photo_id')
    .select('photo_rendition.object_key')
    .where({ 'photo.id': id, 'photo_rendition.size': size, 'photo_rendition.format': format })
    .whereNull('photo.removed_at').first();
  return row?.object_key;
}

/** Photos that nothing refers to any more, and removed ones whose objects may still lie there. */
export async function listUnusedPhotos(
  trx: Transaction, unusedForDays: number, limit: number,
): Promise<string[]> {
  const { rows } = await trx.raw(
    `select unused_photos(now() - ? * interval '1 day', ?) as id`, [unusedForDays, limit]);
  return rows.map((row: { id: string }) => row.id);
}
