import { EnvironmentProviders, LOCALE_ID, Provider } from '@angular/core';
import { MATERIAL_ANIMATIONS } from '@angular/material/core';

/** Providers of every client test: no animation to wait for, one locale on every machine. */
const testProviders: (Provider | EnvironmentProviders)[] = [
  { provide: MATERIAL_ANIMATIONS, useValue: { animationsDisabled: true } },
  { provide: LOCALE_ID, useValue: 'en-GB' },
];

// The builder reads the default export and no other.
export default testProviders;
