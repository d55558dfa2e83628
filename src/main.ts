import { bootstrapApplication } from '@angular/platform-browser';
import { App } from './app/app';
import { appConfig } from './app/app-config';

// Nothing can be shown when the start itself fails, so the console is the only place left.
bootstrapApplication(App, appConfig).catch((error: unknown) => console.error(error));
