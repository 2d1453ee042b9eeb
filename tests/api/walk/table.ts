import { randomUUID } from 'node:crypto';
import { freeRegistryNo } from '#tests/support/factories.ts';
import { fullSheet, looseCalibration, WALKERS, type Scene, type Walker } from './scene.ts';

export interface WalkRequest {
  path: string;
  query?: Record<string, string>;
  body?: unknown;
  /** Sent as application/pdf. */
  file?: Buffer;
}

/** One route, walked: a request that is right in every way, and who may make it. */
export interface WalkRow {
  /** Made anew for each walker, so that an act of one does not stand in another's way. */
  request(scene: Scene, walker: Walker): WalkRequest | Promise<WalkRequest>;
  may: readonly Walker[];
  /** Status for those who may. */
  ok: 200 | 201;
  /** Status for the others who are signed in: 404 where they may not even know. */
  otherwise: 403 | 404;
  /** The request ends the session it is sent in. */
  endsSession?: boolean;
}

const EVERYBODY = WALKERS;
const SIGNED_IN = WALKERS.filter((walker) => walker !== 'nobody');
/** Who reads home in full. */
const READERS: readonly Walker[] = [
  'registrar',
  'laboratory administrator',
  'metrologist',
  'signatory',
  'reader',
  'assessor',
];
const AT_HOME: readonly Walker[] = ['laboratory administrator', 'metrologist', 'signatory', 'reader'];

const fixed = (path: string, query?: Record<string, string>) => () => ({ path, query });

/** Every route by `METHOD path`, as declared. The walk fails where a route has no row here. */
export const WALK: Readonly<Record<string, WalkRow>> = {
  // health and identity
  'GET /api/health': { request: fixed('/api/health'), may: EVERYBODY, ok: 200, otherwise: 403 },
  'GET /api/session': { request: fixed('/api/session'), may: EVERYBODY, ok: 200, otherwise: 403 },
  'POST /api/session': {
    request: (scene, walker) => {
      const { email, password } = scene.person(walker);
      return { path: '/api/session', body: { email, password } };
    },
    may: EVERYBODY,
    ok: 200,
    otherwise: 403,
    endsSession: true,
  },
  'DELETE /api/session': {
    request: fixed('/api/session'),
    may: SIGNED_IN,
    ok: 200,
    otherwise: 403,
    endsSession: true,
  },
  'PUT /api/laboratories/:laboratoryId/people/:accountId': {
    request: ({ home, person }) => ({
      path: `/api/laboratories/${home.id}/people/${person('comparison pilot').accountId}`,
      body: { role: 'reader', state: 'ended', validFrom: '2020-01-01', validTo: null },
    }),
    may: ['registrar', 'laboratory administrator'],
    ok: 200,
    otherwise: 403,
  },
  // network
  'GET /api/laboratories': { request: fixed('/api/laboratories'), may: SIGNED_IN, ok: 200, otherwise: 403 },
  'GET /api/laboratories/:laboratoryId': {
    request: ({ home }) => ({ path: `/api/laboratories/${home.id}` }),
    may: SIGNED_IN,
    ok: 200,
    otherwise: 403,
  },
  // documents
  'POST /api/documents': {
    request: ({ home }) => ({
      path: '/api/documents',
      query: { laboratory: home.id, name: 'certificate.pdf' },
      file: Buffer.from(`%PDF-1.7 ${randomUUID()} %%EOF`),
    }),
    may: ['registrar', 'laboratory administrator', 'metrologist', 'signatory'],
    ok: 201,
    otherwise: 403,
  },
  'GET /api/documents/:documentId': {
    request: ({ documentId }) => ({ path: `/api/documents/${documentId}` }),
    may: READERS,
    ok: 200,
    otherwise: 404,
  },
  // desk
  'GET /api/desk': { request: fixed('/api/desk'), may: SIGNED_IN, ok: 200, otherwise: 403 },
  'GET /api/find': { request: fixed('/api/find', { q: 'E2' }), may: SIGNED_IN, ok: 200, otherwise: 403 },
  // chains
  'GET /api/chains': { request: fixed('/api/chains', { q: '' }), may: SIGNED_IN, ok: 200, otherwise: 403 },
  'GET /api/chains/:valueUid': {
    request: ({ valueUid }) => ({ path: `/api/chains/${valueUid}` }),
    may: READERS,
    ok: 200,
    otherwise: 404,
  },
  'GET /api/chains/:valueUid/covariance/:otherUid': {
    // The reference is upstream of home's weight: its statement is open to home.
    request: ({ valueUid, referenceUid }) => ({ path: `/api/chains/${valueUid}/covariance/${referenceUid}` }),
    may: READERS,
    ok: 200,
    otherwise: 404,
  },
};

// The rows of standards and calibrations use these.
export const PENDING = { AT_HOME, freeRegistryNo, fullSheet, looseCalibration };
