import { InjectionToken } from '@angular/core';

/** Makes the id of a thing before it is sent: a random UUID (RFC 9562, version 4). */
export const NEW_ID = new InjectionToken<() => string>('NEW_ID', {
  providedIn: 'root',
  factory: () => randomId,
});

// crypto.randomUUID exists on https and localhost only; a club's own network may have neither.
function randomId(): string {
  const bytes = crypto.getRandomValues(new Uint8Array(16));
  bytes[6] = ((bytes[6] ?? 0) & 0x0f) | 0x40;
  bytes[8] = ((bytes[8] ?? 0) & 0x3f) | 0x80;
  const hex = [...bytes].map((byte) => byte.toString(16).padStart(2, '0')).join('');
  return hex.replace(/^(.{8})(.{4})(.{4})(.{4})(.{12})$/, '$1-$2-$3-$4-$5');
}
