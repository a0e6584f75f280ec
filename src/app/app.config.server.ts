import { HttpBackend } from '@angular/common/http';
import { mergeApplicationConfig, type ApplicationConfig } from '@angular/core';
import { provideServerRendering, withRoutes } from '@angular/ssr';
import { appConfig } from './app.config';
import { serverRoutes } from './app.routes.server';
import { RenderingBackend } from './core/rendering-backend';

/** Relative addresses are resolved against the request's own, which `server.ts` sets to where the server listens. */
export const serverConfig: ApplicationConfig = mergeApplicationConfig(appConfig, {
  providers: [provideServerRendering(withRoutes(serverRoutes)), { provide: HttpBackend, useClass: RenderingBackend }],
});
