import { registerLocaleData } from '@angular/common';
import britishEnglish from '@angular/common/locales/en-GB';
import { bootstrapApplication } from '@angular/platform-browser';

import { App } from './app/app';
import { appConfig } from './app/app.config';

registerLocaleData(britishEnglish);

bootstrapApplication(App, appConfig).catch((error: unknown) => {
  console.error(error);
});
