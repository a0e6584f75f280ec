import { type APIRequestContext, expect, type Locator, type Page } from '@playwright/test';
import sharp from 'sharp';
import type { FindView, NewFind } from '../../shared/contracts/finds.js';
import type { TrayPicture } from '../../shared/contracts/images.js';
import { xsrfToken } from './screens.js';

/** A picture brought in and put into a public find of its own, by the API. @returns its id */
export async function pictureInFind(request: APIRequestContext, name: string, bytes: Buffer): Promise<string> {
  const imageId = await upload(request, name, bytes);
  const find: NewFind = {
    imageIds: [imageId],
    observation: { kind: 'at the bench', observedOn: '2026-02-15', substrate: 'card', remarks: '' },
    place: {
      exact: { words: '', latitude: null, longitude: null, uncertaintyM: null },
      publicWords: 'the tram depot, Calder Wick',
      sensitivity: 'none',
    },
    visibility: 'public',
    heldUntil: null,
  };
  const made = (await send(request, '/api/finds', find)) as FindView;
  expect(made.observations).toHaveLength(1);
  return imageId;
}

/** The picture's scale, by a line of known length in it. */
export async function setReference(
  request: APIRequestContext,
  imageId: string,
  reference: { readonly lengthPx: number; readonly lengthUm: number },
): Promise<void> {
  await send(request, `/api/images/${imageId}/scales`, {
    by: 'reference',
    a: { x: 20, y: 100 },
    b: { x: 20 + reference.lengthPx, y: 100 },
    objectId: null,
    lengthUm: reference.lengthUm,
    toleranceUm: 0,
  });
}

async function upload(request: APIRequestContext, name: string, bytes: Buffer): Promise<string> {
  const headers = { 'Tus-Resumable': '1.0.0', 'X-XSRF-TOKEN': await xsrfToken(request) };
  const begun = await request.post('/api/uploads', {
    headers: {
      ...headers,
      'Upload-Length': String(bytes.length),
      'Upload-Metadata': `filename ${Buffer.from(name).toString('base64')}`,
    },
  });
  const address = new URL(begun.headers()['location'] ?? '', begun.url()).pathname;
  const sent = await request.patch(address, {
    headers: { ...headers, 'Upload-Offset': '0', 'Content-Type': 'application/offset+octet-stream' },
    data: bytes,
  });
  expect(sent.status()).toBe(204);
  const imageId = address.split('/').pop() as string;
  await expect
    .poll(async () => {
      const tray = (await (await request.get('/api/tray')).json()) as TrayPicture[];
      return tray.find(({ id }) => id === imageId)?.state;
    })
    .toBe('ready');
  return imageId;
}

async function send(request: APIRequestContext, path: string, data: object): Promise<unknown> {
  const answer = await request.post(path, { headers: { 'X-XSRF-TOKEN': await xsrfToken(request) }, data });
  if (!answer.ok()) throw new Error(`${path} answered ${answer.status()}: ${await answer.text()}`);
  return answer.json();
}

/** The bench as a person has it before them. */
export class BenchPage {
  readonly surface: Locator;
  readonly kept: Locator;

  constructor(readonly page: Page) {
    this.surface = page.getByRole('application');
    this.kept = page.getByText('all kept');
  }

  async open(imageId: string): Promise<this> {
    await this.page.goto(`/images/${imageId}`);
    await this.settled();
    return this;
  }

  async settled(): Promise<void> {
    await expect(this.page.locator('app-bench[data-settled]')).toBeAttached();
  }

  async take(name: string | RegExp): Promise<void> {
    const tools = this.page.getByRole('complementary', { name: 'Tools' });
    await tools.getByRole('button', { name, pressed: false }).click();
    await expect(tools.getByRole('button', { name, pressed: true })).toBeVisible();
  }

  /** Everything drawn, as the list says it; opened once. */
  async measured(): Promise<string[]> {
    const details = this.page.locator('details', { hasText: 'Measured on this picture' });
    if ((await details.count()) === 0) return [];
    if ((await details.getAttribute('open')) === null) await details.locator('summary').click();
    return details.getByRole('listitem').allInnerTexts();
  }

  /** Puts the tool and the selection away, and the pointer where it hovers over nothing. */
  async atRest(): Promise<void> {
    for (let i = 0; i < 3; i++) await this.page.keyboard.press('Escape');
    await this.page.mouse.move(3, 3);
  }
}

export interface Pixels {
  readonly width: number;
  readonly height: number;
  /** 0–255 of each channel */
  at(x: number, y: number): readonly [number, number, number];
}

/** A screenshot to be read pixel by pixel. */
export async function pixelsOf(png: Buffer): Promise<Pixels> {
  const { data, info } = await sharp(png).removeAlpha().raw().toBuffer({ resolveWithObject: true });
  return {
    width: info.width,
    height: info.height,
    at: (x, y) => {
      const i = (y * info.width + x) * 3;
      return [data[i] ?? 0, data[i + 1] ?? 0, data[i + 2] ?? 0];
    },
  };
}
