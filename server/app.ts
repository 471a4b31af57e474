import { readFileSync } from 'node:fs';
import http, { type Server as HttpServer } from 'node:http';
import https from 'node:https';
import path from 'node:path';
import compression from 'compression';
import express from 'express';
import helmet from 'helmet';
import { pino, type Logger } from 'pino';
import { pinoHttp } from 'pino-http';
import type { Clock } from '../shared/kernel/clock';
import { newId } from '../shared/kernel/ids';
import type { Config } from './config';
import { openDataSources } from './db/data-sources';
import { sessionSecret } from './db/session-secret';
import { SessionStore } from './http/session-store';
import { UnitOfWork } from './db/unit-of-work';
import { Writer } from './db/write';
import type { Deps } from './deps';
import { errorHandler } from './http/errors';
import { mountRoutes, noSuchRoute } from './http/mount-routes';
import { Principals } from './http/principal';
import type { AnyRoute } from './http/route';
import { sessionLayer, type SessionLayer } from './http/session';
import { startJobs } from './jobs';
import { Runs } from './jobs/runs';
import { WorkerPool } from './jobs/worker-pool';
import { allRoutes, liveSources } from './modules';
import { Hub } from './realtime/hub';
import { LiveReader } from './realtime/live-reader';
import { Publisher } from './realtime/publisher';

/** A server that is built but does not listen yet. */
export interface App {
  http: HttpServer;
  deps: Deps;
  routes: readonly AnyRoute[];
  /** Stop taking requests, finish what was begun, close the files. */
  close(): Promise<void>;
}

/**
 * Build the server on a configuration and a clock.
 * @returns the server, not listening; `main.ts` and the tests listen
 */
export async function createApp(config: Config, clock: Clock): Promise<App> {
  const log = pino({ level: config.LOG_LEVEL });
  const data = await openDataSources(config.DATABASE_FILE);
  const unitOfWork = new UnitOfWork(data.writer);
  const reader = new LiveReader(data.readHandle, liveSources, clock);
  const principals = new Principals(data.readHandle);
  const sessions = new SessionStore(unitOfWork, data.readHandle, clock);
  const pool = new WorkerPool();
  const live: { hub?: Hub; publisher?: Publisher } = {};
  let wakeMail: () => void = () => undefined;
  const writer = new Writer({
    unitOfWork,
    clock,
    onCommit: (committed) => {
      live.publisher?.add(committed);
      live.hub?.replace(committed.changed.get('people') ?? []);
    },
    onMail: () => wakeMail(),
  });
  const server = express();
  const listener =
    config.TLS_CERT && config.TLS_KEY
      ? https.createServer({ cert: readFileSync(config.TLS_CERT), key: readFileSync(config.TLS_KEY) }, server)
      : http.createServer(server);
  const deps: Deps = {
    config,
    clock,
    log,
    data,
    unitOfWork,
    writer,
    principals,
    sessions,
    reader,
    pool,
    runs: new Runs(pool, clock, log),
    endSessions: async (key, exceptSid) => {
      await sessions.endAllOf(key, exceptSid);
      live.hub?.endAllOf(key);
    },
    endSockets: (sid) => live.hub?.endSession(sid),
    replaceSockets: (ids) => live.hub?.replace(ids),
    phones: (installationId) => live.hub?.phones(installationId) ?? 0,
    publicUrl: () => config.PUBLIC_URL?.replace(/\/$/, '') ?? addressOf(listener),
    wakeMail: () => wakeMail(),
  };
  const layer = sessionLayer({
    secret: config.SESSION_SECRET ?? sessionSecret(config.DATABASE_FILE),
    store: sessions,
    principals,
    clock,
    secure: config.TLS_CERT !== undefined || (config.PUBLIC_URL?.startsWith('https:') ?? false),
    trustProxy: config.TRUST_PROXY !== undefined,
  });
  const routes = allRoutes(deps, layer);
  build(server, config, log, deps, layer, routes);
  live.hub = new Hub({ http: listener, session: layer.session, principals, reader, clock });
  live.publisher = new Publisher(reader, live.hub);
  const jobs = await startJobs(deps);
  wakeMail = jobs.wakeMail;
  return {
    http: listener,
    deps,
    routes,
    close: async () => {
      await jobs.stop();
      await pool.close();
      await live.hub?.close();
      listener.closeAllConnections();
      await unitOfWork.idle();
      live.publisher?.close();
      await data.close();
    },
  };
}

function addressOf(listener: HttpServer): string {
  const address = listener.address();
  if (address === null || typeof address === 'string') return 'http://localhost';
  const scheme = listener instanceof https.Server ? 'https' : 'http';
  const host =
    address.address === '0.0.0.0' || address.address === '127.0.0.1' || address.address === '::'
      ? 'localhost'
      : address.address;
  return `${scheme}://${host}:${address.port}`;
}

function build(
  server: express.Express,
  config: Config,
  log: Logger,
  deps: Deps,
  layer: SessionLayer,
  routes: readonly AnyRoute[],
): void {
  if (config.TRUST_PROXY !== undefined)
    server.set(
      'trust proxy',
      /^\d+$/.test(config.TRUST_PROXY) ? Number(config.TRUST_PROXY) : config.TRUST_PROXY,
    );
  server.disable('x-powered-by');
  const tls = config.TLS_CERT !== undefined || (config.PUBLIC_URL?.startsWith('https:') ?? false);
  server.use(
    pinoHttp({
      logger: log,
      genReqId: (_req, res) => {
        const id = newId().slice(0, 12);
        res.setHeader('x-request-id', id);
        return id;
      },
      autoLogging: false,
    }),
    helmet({
      contentSecurityPolicy: {
        directives: {
          defaultSrc: ["'self'"],
          scriptSrc: ["'self'"],
          styleSrc: ["'self'"],
          imgSrc: ["'self'", 'data:', 'blob:'],
          connectSrc: ["'self'", 'ws:', 'wss:'],
          fontSrc: ["'self'"],
          objectSrc: ["'none'"],
          frameAncestors: ["'none'"],
          // On plain http this would blank the page: the browser would ask for everything over https.
          upgradeInsecureRequests: tls ? [] : null,
        },
      },
      strictTransportSecurity: tls,
      crossOriginOpenerPolicy: tls,
      originAgentCluster: tls,
    }),
    compression(),
  );
  const api = express.Router();
  api.use((_req, res, next) => {
    res.set('Cache-Control', 'no-store');
    next();
  });
  api.use(...layer.handlers);
  mountRoutes(api, routes, { writer: deps.writer, principals: deps.principals, csrf: layer.csrf });
  api.use(noSuchRoute);
  server.use('/api', api);
  const clientDir = path.resolve(config.CLIENT_DIR);
  server.use(
    '/assets',
    express.static(path.join(clientDir, 'assets'), { immutable: true, maxAge: '1y', fallthrough: false }),
  );
  server.use(express.static(clientDir, { index: false, maxAge: '1h' }));
  server.get('/{*any}', (_req, res) => {
    res.set('Cache-Control', 'no-cache').sendFile(path.join(clientDir, 'index.html'));
  });
  server.use(errorHandler(log));
}
