import type { APIRequestContext } from '@playwright/test';
import { DEMO_PEOPLE } from '../../server/demo.js';
import type { GalleryPage } from '../../shared/contracts/gallery.js';
import type { RigView } from '../../shared/contracts/rigs.js';
import type { Role } from '../../shared/permission/can.js';

/** Every screen of the demo, and as whom it is seen. Screenshots and the accessibility check walk this list. */
export interface Screen {
  readonly name: string;
  readonly path: string;
  readonly as: Role | 'visitor';
}

/** Signs this context in as the demo's person of that role. */
export async function signInAs(request: APIRequestContext, role: Role): Promise<void> {
  const person = DEMO_PEOPLE.find((candidate) => candidate.role === role);
  if (!person) throw new Error(`The demo has no ${role}.`);
  await request.get('/api/session');
  const answer = await request.post('/api/session', {
    headers: { 'X-XSRF-TOKEN': await xsrfToken(request) },
    data: { email: person.email, password: person.password },
  });
  if (!answer.ok()) throw new Error(`Signing in as ${role} answered ${answer.status()}.`);
}

export async function xsrfToken(request: APIRequestContext): Promise<string> {
  const { cookies } = await request.storageState();
  return decodeURIComponent(cookies.find(({ name }) => name === 'XSRF-TOKEN')?.value ?? '');
}

/** @param request signed in as the photographer, whose rigs are shown */
export async function screensOf(request: APIRequestContext): Promise<Screen[]> {
  const gallery = (await (await request.get('/api/gallery')).json()) as GalleryPage;
  const rigs = (await (await request.get('/api/rigs')).json()) as RigView[];
  const tile = gallery.tiles.find(({ scale }) => scale?.grounds === 'calibrated') ?? gallery.tiles[0];
  const setting = rigs.flatMap(({ settings }) => settings)[0];
  if (!tile?.taxonId || !setting) throw new Error('The demo has no calibrated picture with a name, or no setting.');
  return [
    { name: 'gallery', path: '/', as: 'visitor' },
    { name: 'gallery-taxon', path: `/?taxon=${tile.taxonId}`, as: 'visitor' },
    { name: 'gallery-nothing', path: '/?q=zzzz', as: 'visitor' },
    { name: 'find', path: `/finds/${tile.findId}`, as: 'visitor' },
    { name: 'find-mine', path: `/finds/${tile.findId}`, as: 'photographer' },
    { name: 'find-hidden', path: '/finds/01900000-0000-7000-8000-000000000000', as: 'visitor' },
    { name: 'taxa', path: '/taxa', as: 'visitor' },
    { name: 'taxon', path: `/taxa/${tile.taxonId}`, as: 'visitor' },
    { name: 'about', path: '/about', as: 'visitor' },
    { name: 'sign-in', path: '/sign-in', as: 'visitor' },
    { name: 'bench', path: `/images/${tile.id}`, as: 'photographer' },
    { name: 'bench-visitor', path: `/images/${tile.id}`, as: 'visitor' },
    { name: 'desk', path: '/desk', as: 'photographer' },
    { name: 'tray', path: '/desk/tray', as: 'photographer' },
    { name: 'tray-empty', path: '/desk/tray', as: 'identifier' },
    { name: 'rigs', path: '/desk/rigs', as: 'photographer' },
    { name: 'calibrate', path: `/desk/rigs/${setting.rigId}/settings/${setting.id}/calibrate`, as: 'photographer' },
    { name: 'profile', path: '/desk/profile', as: 'photographer' },
    { name: 'keep', path: '/keep', as: 'keeper' },
  ];
}
