import type { $ZodType, input } from 'zod/v4/core';
import type { RouteContract } from '../../shared/contracts/route.js';
import type { ROUTES } from '../../shared/contracts/routes.js';
import { newId } from '../../server/ids.js';

/** What examples can speak of; every path parameter of the API is among them. */
export interface Ids {
  readonly findId: string;
  readonly observationId: string;
  readonly preparationId: string;
  readonly determinationId: string;
  readonly imageId: string;
  readonly seriesId: string;
  readonly rigId: string;
  readonly settingId: string;
  readonly taxonId: string;
  readonly token: string;
  readonly invitationId: string;
  readonly personId: string;
  readonly mailId: string;
  readonly jobId: string;
  /** who asks; for a visitor somebody else */
  readonly actorId: string;
}

/** A request that a permitted actor could send. */
export interface Example {
  readonly body?: (ids: Ids) => object;
  /** with its question mark */
  readonly query?: string;
  /** the actor has to sign in again afterwards */
  readonly endsSession?: boolean;
}

type ExampleOf<C extends RouteContract> = Omit<Example, 'body'> &
  (C extends { readonly body: infer B extends $ZodType }
    ? { readonly body: (ids: Ids) => input<B> }
    : { readonly body?: never });

type Examples = {
  readonly [G in keyof typeof ROUTES]: {
    readonly [K in keyof (typeof ROUTES)[G]]: (typeof ROUTES)[G][K] extends infer C extends RouteContract
      ? ExampleOf<C>
      : never;
  };
};

const PASSWORD = 'a long enough password';
const address = (): string => `${newId()}@people.example`;
const observation = { kind: 'revisit', observedOn: '2026-02-20', substrate: 'ash bark', remarks: '' } as const;

/** One for every route: a route without one is a type error. */
export const EXAMPLES: Examples = {
  session: {
    read: {},
    signIn: { body: () => ({ email: address(), password: PASSWORD }) },
    signOut: { endsSession: true },
    askReset: { body: () => ({ email: address() }) },
    reset: { body: ({ token }) => ({ token, password: PASSWORD }) },
    readInvitation: {},
    accept: { body: ({ token }) => ({ token, name: 'Somebody New', password: PASSWORD }) },
    saveProfile: {
      body: () => ({ name: 'A person', creditLine: 'A person', defaultLicence: 'by', fingertipMm: 16 }),
    },
    savePortrait: {},
  },
  keep: {
    people: {},
    invite: { body: () => ({ email: address(), role: 'editor' }) },
    withdrawInvitation: {},
    changeRole: { body: () => ({ role: 'identifier' }) },
    mails: {},
    mail: {},
    jobs: {},
    retryJob: {},
    checkIntegrity: {},
  },
  images: {
    tray: {},
    read: {},
    edit: { body: () => ({ title: 'gill edge' }) },
    discard: {},
    retry: {},
    original: {},
    picture: { query: '?width=200&format=png&bar=on' },
    scales: {},
    setScale: { body: () => ({ by: 'nothing' }) },
  },
  rigs: {
    list: {},
    add: { body: () => ({ name: 'a lens on a phone', camera: '', remarks: '' }) },
    read: {},
    addSetting: {
      body: () => ({
        name: newId(),
        objective: '',
        magnification: null,
        numericalAperture: null,
        oneSitting: true,
        captureMode: '',
      }),
    },
    calibrate: {
      body: ({ imageId }) => ({
        imageId,
        marks: [
          { at: { x: 10, y: 10 }, index: 0 },
          { at: { x: 210, y: 11 }, index: 1 },
          { at: { x: 410, y: 10 }, index: 2 },
        ],
        spacingUm: 100,
        toleranceUm: 1,
      }),
    },
  },
  notes: {
    read: {},
    since: { query: '?after=0' },
    push: {
      body: ({ imageId, actorId }) => {
        const noteId = newId();
        const geometry = { type: 'pointer' as const, at: { x: 100, y: 100 }, label: { x: 200, y: 80 } };
        const note = {
          id: noteId,
          imageId,
          layer: actorId,
          kind: 'point' as const,
          seriesId: null,
          geometry,
          text: 'a clamp',
        };
        return { edits: [{ id: newId(), noteId, before: null, after: note }] };
      },
    },
  },
  series: {
    ofImage: {},
    open: { body: () => ({ structure: 'thread', edgeRule: 'outer', ornamentIncluded: null }) },
    read: {},
    edit: { body: () => ({ edgeRule: 'middle' }) },
    csv: {},
  },
  finds: {
    mine: {},
    make: {
      body: () => ({
        imageIds: [],
        observation,
        place: {
          exact: { words: 'under the sleepers', latitude: null, longitude: null, uncertaintyM: null },
          publicWords: 'the depot',
          sensitivity: 'none',
        },
        visibility: 'private',
        heldUntil: null,
      }),
    },
    read: {},
    edit: { body: () => ({ fruitBodies: 2 }) },
    addObservation: { body: () => ({ ...observation, imageIds: [] }) },
    editObservation: { body: () => ({ remarks: 'drier than last time' }) },
    addPreparation: {
      body: ({ observationId }) => ({
        observationId,
        title: newId(),
        part: 'gills',
        medium: 'water',
        stain: '',
        condition: 'fresh',
        imageIds: [],
      }),
    },
    determine: {
      body: ({ taxonId }) => ({ taxonId, qualifier: 'cf.', reason: 'by the look of it', confidence: 'a guess' }),
    },
    decide: {},
  },
  taxa: {
    names: {},
    read: {},
    add: {
      body: () => ({ name: `Exempla ${newId()}`, authorship: '', rank: 'species', code: 'botanical', parentId: null }),
    },
  },
  gallery: {
    page: { query: '?limit=5' },
  },
};
