import type { Response } from 'express';
import { created, noContent, ok, publicRoute, requireRole, route, signedIn, type Answer,
  type Route } from '../http/route';
import { photoUploadReader } from './photo-upload';
import { blursRequest, photoFile, photoFileParams, photoParams, photoUpload,
  uploadedPhoto } from './photos-schemas';
import type { PhotoFile, PhotosService } from './photos-service';

export function photosRoutes(service: PhotosService, incoming: string): Route[] {
  const member = requireRole('member');
  return [
    route({
      method: 'post', path: '/api/photos', operationId: 'uploadPhoto', limit: 'heavy',
      summary: 'Upload a photo; safe to repeat with the same id', access: member,
      before: [photoUploadReader(incoming)], bodyType: 'multipart/form-data', body: photoUpload,
      answers: { 200: uploadedPhoto, 201: uploadedPhoto }, refusals: [409, 413, 415],
      handle: async (call) => {
        const { photo, isNew } = await service.receive(signedIn(call).id, call.body.id,
          call.body.photo);
        return isNew ? created(`/api/photos/${photo.id}`, photo) : ok(photo);
      },
    }),
    route({
      method: 'get', path: '/api/photos/:id', operationId: 'getPhoto', limit: 'read',
      summary: 'A photo of one\'s own', access: member, params: photoParams,
      answers: { 200: uploadedPhoto }, refusals: [404],
      handle: async (call) =>
        ok(await service.view(call.actor, signedIn(call).id, call.params.id)),
    }),
    route({
      method: 'put', path: '/api/photos/:id/blurs', operationId: 'blurPhoto', limit: 'heavy',
      summary: 'Blur parts of a photo before it is filed', access: member, params: photoParams,
      body: blursRequest, answers: { 200: uploadedPhoto }, refusals: [404, 409],
      handle: async (call) => ok(await service.blur(call.actor, signedIn(call).id,
        call.params.id, call.body.blurs)),
    }),
    route({
      method: 'delete', path: '/api/photos/:id', operationId: 'removePhoto', limit: 'write',
      summary: 'Remove a photo that was not filed', access: member, params: photoParams,
      answers: { 204: null }, refusals: [404, 409],
      handle: async (call) => {
        await service.remove(call.actor, signedIn(call).id, call.params.id);
        return noContent();
      },
    }),
    route({
      method: 'get', path: '/api/photos/:id/:file', operationId: 'getPhotoFile', limit: 'read',
      summary: 'The picture itself, where the reader may see it', access: publicRoute,
      params: photoFileParams, answers: { 200: photoFile }, answerType: 'image/*',
      refusals: [404],
      handle: async ({ actor, params, response }) =>
        sendFile(response, params.file, await service.file(actor, params.id, params.file)),
    }),
  ];
}

/** Express answers 304 where the reader's copy has the same tag. */
function sendFile(response: Response, name: string, file: PhotoFile): Answer {
  response.set({
    'Content-Type': name.endsWith('.webp') ? 'image/webp' : 'image/jpeg',
    'Content-Security-Policy': "default-src 'none'; sandbox",
    'X-Content-Type-Options': 'nosniff',
    'Cache-Control': file.isPublic ? 'public, max-age=300' : 'private, no-cache',
    // A mail shows public pictures from another origin.
    'Cross-Origin-Resource-Policy': file.isPublic ? 'cross-origin' : 'same-origin',
    ETag: file.tag,
  }).send(file.bytes);
  return { status: 200, written: true };
}
