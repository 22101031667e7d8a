import { mkdirSync, mkdtempSync } from 'node:fs';
import { rm } from 'node:fs/promises';
import { join } from 'node:path';
import type { RequestHandler } from 'express';
import multer, { MulterError } from 'multer';
import { ProblemError } from '../errors';
import { maximumBytes } from '../images/decoder-messages';

/**
 * Reads one file of a multipart request to disk and hands its path on as `body.photo`. The file is
 * gone when the response is, however it ends.
 */
export function photoUploadReader(incoming: string): RequestHandler {
  return (request, response, next) => {
    mkdirSync(incoming, { recursive: true, mode: 0o700 });
    const directory = mkdtempSync(join(incoming, 'upload-'));
    response.once('close', () => void rm(directory, { recursive: true, force: true }));
    const read = multer({
      storage: multer.diskStorage({
        destination: directory,
        filename: (_request, _file, done) => done(null, 'received'),
      }),
      limits: { fileSize: maximumBytes, files: 1, fields: 4, fieldSize: 200, parts: 6 },
    }).single('photo');
    read(request, response, (error: unknown) => {
      if (error) return next(toProblem(error));
      // A text field of that name must not pass for a path.
      request.body = { ...request.body, photo: request.file?.path };
      next();
    });
  };
}

function toProblem(error: unknown): unknown {
  if (error instanceof MulterError) {
    return error.code === 'LIMIT_FILE_SIZE' ? new ProblemError(413, 'photo_too_large')
      : new ProblemError(400, 'malformed_body');
  }
  const isFileFault = error instanceof Error && 'code' in error;
  return isFileFault ? error : new ProblemError(400, 'malformed_body');
}
