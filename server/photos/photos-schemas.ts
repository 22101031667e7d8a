import { renditionSizes, type BlurArea, type UploadedPhoto } from '#shared/reports/photo';
import { z } from '../http/openapi-zod';

const fraction = z.number().min(0).max(1);

export const blurArea = z.strictObject({
  x: fraction, y: fraction, width: fraction.gt(0), height: fraction.gt(0),
}) satisfies z.ZodType<BlurArea>;

export const uploadedPhoto = z.strictObject({
  id: z.uuid(), width: z.int(), height: z.int(), blurs: z.array(blurArea),
}).openapi('UploadedPhoto') satisfies z.ZodType<UploadedPhoto>;

export const photoParams = z.object({ id: z.uuid() });

/** `photo` is the path of the file that was received, put there by the reader of the upload. */
export const photoUpload = z.strictObject({
  id: z.uuid(),
  photo: z.string().openapi({ format: 'binary', description: 'JPEG, PNG or WebP' }),
});

export const blursRequest = z.strictObject({ blurs: z.array(blurArea).max(40) });

const fileNames = Object.keys(renditionSizes)
  .flatMap((size) => [`${size}.webp`, `${size}.jpeg`]);
export const photoFileParams = photoParams.extend({ file: z.enum(fileNames) });
export const photoFile = z.string().openapi({ format: 'binary' });
