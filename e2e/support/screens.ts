import type { APIRequestContext, Page } from '@playwright/test';
import { DEMO_PEOPLE } from '../../server/demo.js';
import type { GalleryPage } from '../../shared/contracts/gallery.js';
import type { RigView } from '../../shared/contracts/rigs.js';
import type { Role } from '../../shared/permission/can.js';

/** Every screen of the demo, and as whom it is seen. Screenshots and the accessibility check walk this list. */
export interface Screen {
  readonly name: string;
  readonly path: string;
  readonly as: Role | 'visitor';
  /** what is opened on it before it is looked at */
  readonly open?: (page: Page) => Promise<void>;
}

const press =
  (...names: readonly RegExp[]) =>
  async (page: Page): Promise<void> => {
    for (const name of names) await page.getByRole('button', { name }).first().click();
  };

/** On a phone the scale lies in a sheet of its own. */
const pressInScale =
  (name: RegExp) =>
  async (page: Page): Promise<void> => {
    const sheet = page.getByRole('button', { name: 'Scale', exact: true });
    if (await sheet.isVisible()) await sheet.click();
    await press(name)(page);
  };

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
  const calibrate = `/desk/rigs/${setting.rigId}/settings/${setting.id}/calibrate`;
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
    { name: 'calibrate', path: calibrate, as: 'photographer' },
    { name: 'profile', path: '/desk/profile', as: 'photographer' },
    { name: 'keep', path: '/keep', as: 'keeper' },
    { name: 'keep-mail', path: '/keep/mail', as: 'keeper' },
    { name: 'keep-jobs', path: '/keep/jobs', as: 'keeper' },
    { name: 'keep-originals', path: '/keep/originals', as: 'keeper', open: press(/check/i) },
    { name: 'reset', path: '/reset', as: 'visitor' },
    { name: 'new-password', path: '/reset/a-token-from-a-mail', as: 'visitor' },
    { name: 'invitation-lapsed', path: '/invitation/a-token-from-a-mail', as: 'visitor' },
    { name: 'nothing-here', path: '/nothing/here', as: 'visitor' },
    { name: 'make-a-find', path: '/desk/tray', as: 'photographer', open: press(/^Make a find/) },
    { name: 'add-a-rig', path: '/desk/rigs', as: 'photographer', open: press(/^Add a rig/) },
    { name: 'look-and-mark', path: `${calibrate}?image=${tile.id}`, as: 'photographer' },
    { name: 'give-a-name', path: `/finds/${tile.findId}`, as: 'photographer', open: press(/^Give another name/) },
    { name: 'details', path: `/finds/${tile.findId}`, as: 'photographer', open: press(/^Details/) },
    { name: 'how-sure', path: `/images/${tile.id}`, as: 'photographer', open: pressInScale(/^How sure is this/) },
    { name: 'set-scale', path: `/images/${tile.id}`, as: 'photographer', open: pressInScale(/^Change the scale/) },
  ];
}
