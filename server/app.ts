import { randomUUID } from 'node:crypto';
import fs from 'node:fs';
import path from 'node:path';
import cookieParser from 'cookie-parser';
import express, { type Express, type NextFunction, type Request, type RequestHandler, type Response } from 'express';
import { rateLimit } from 'express-rate-limit';
import expressStaticGzip from 'express-static-gzip';
import helmet from 'helmet';
import { pinoHttp } from 'pino-http';
import { onceForKey } from '@/server/commands/idempotency';
import type { AppContext } from '@/server/context';
import { AppError, forbidden, notFound } from '@/server/errors';
import { errorResponder } from '@/server/errorResponder';
import { mountApiDescription } from '@/server/openApi';
import { mayInYard } from '@/server/policies/yardPolicy';
import { routes } from '@/server/routes';
import { authenticate } from '@/server/routes/authenticate';
import type { RequestContext, Route } from '@/server/routes/route';
import { limits } from '@/shared/limits';
import { z } from '@/shared/zod';

const yardIdSchema = z.uuid();

/** Builds the whole server as one Express application on a ready context. */
export function createApp(app: AppContext): Express {
  const server = express();
  server.set('trust proxy', app.env.TRUSTED_PROXIES);
  server.disable('x-powered-by');
  server.use(pinoHttp({
    logger: app.log,
    genReqId: () => randomUUID(),
    autoLogging: app.env.LOG_LEVEL === 'debug',
    customLogLevel: (_request, response, error) => (error && response.statusCode >= 500 ? 'error' : 'info'),
  }));
  server.use(helmet({
    contentSecurityPolicy: {
      directives: {
        'default-src': ["'self'"], 'script-src': ["'self'"], 'style-src': ["'self'", "'unsafe-inline'"], 'img-src': ["'self'", 'data:', 'blob:'],
        'connect-src': ["'self'"], 'frame-ancestors': ["'none'"], 'upgrade-insecure-requests': null,
      },
    },
    strictTransportSecurity: app.publicUrl.startsWith('https:'),
  }));
  const api = express.Router();
  api.use((_request, response, next) => {
    response.setHeader('Cache-Control', 'no-store');
    next();
  });
  api.use(limiter(app.env.RATE_LIMIT_PER_MINUTE, 60_000));
  api.use(requireJson, express.json({ limit: limits.requestBytes, strict: true }), cookieParser());
  const authLimiter = limiter(app.env.AUTH_RATE_LIMIT, 15 * 60_000);
  for (const route of routes) {
    const handlers: RequestHandler[] = route.limit === 'auth' ? [authLimiter] : [];
    api[route.method](route.path, ...handlers, serve(app, route));
  }
  mountApiDescription(api, routes);
  api.use(() => {
    throw notFound('page of the API');
  });
  server.use('/api', api);
  if (app.env.WEB_DIR !== undefined && fs.existsSync(app.env.WEB_DIR)) {
    mountWeb(server, path.resolve(app.env.WEB_DIR), app.env.DAPPLE_MODE === 'demonstration');
  }
  server.use(errorResponder(app.log));
  return server;
}

function limiter(limit: number, windowMs: number): RequestHandler {
  return rateLimit({
    windowMs, limit, standardHeaders: 'draft-8', legacyHeaders: false,
    handler: () => {
      throw new AppError('too_many_requests', 'That was very often. Wait a while and try again.');
    },
  });
}

function requireJson(request: Request, _response: Response, next: NextFunction): void {
  const hasBody = Number(request.headers['content-length'] ?? 0) > 0 || request.headers['transfer-encoding'] !== undefined;
  if (hasBody && !request.is('application/json')) {
    throw new AppError('unsupported_media_type', 'Send JSON.');
  }
  next();
}

/** One route as an Express handler: who, what, once, in one transaction, and only what the contract names leaves. */
function serve(app: AppContext, route: Route): RequestHandler {
  return async (request, response) => {
    const now = app.clock.now();
    const effects: (() => Promise<void>)[] = [];
    const context: RequestContext<unknown, unknown, unknown> = {
      app, now, afterCommit: (effect) => void effects.push(effect), requestId: String(request.id), request, response, params: {}, query: {}, body: {},
      user: { id: '', sessionId: '' }, role: 'helper', yardId: '',
    };
    await admit(app, route, context);
    context.params = route.params ? parse(route.params, request.params) : {};
    context.query = route.query ? parse(route.query, request.query) : {};
    context.body = route.body ? parse(route.body, request.body ?? {}) : {};
    const key = request.get('idempotency-key');
    const run = async () => route.response.parse(await route.handler(context));
    const answer = !route.transaction
      ? await run()
      : await app.database.transaction(() => (
        key !== undefined && context.user.id !== ''
          ? onceForKey(app.database, context.user.id, checkedKey(key), { method: route.method, path: request.path, body: request.body as unknown }, now, route.status, run)
          : run()));
    response.status(route.status).json(answer);
    for (const effect of effects) {
      await effect().catch((error: unknown) => {
        app.log.error({ err: error, requestId: context.requestId }, 'what should follow the request failed');
      });
    }
  };
}

async function admit(app: AppContext, route: Route, context: RequestContext<unknown, unknown, unknown>): Promise<void> {
  if (route.access === 'public') {
    return;
  }
  if (route.access === 'demonstration') {
    if (!app.clock.isDemonstration) {
      throw notFound('page of the API');
    }
    return;
  }
  const yardId = typeof route.access === 'object' ? yardIdSchema.safeParse(context.request.params['yardId']) : null;
  const caller = await authenticate(app.database, app.env.TOKEN_SECRET, context.request.get('authorization'), context.now, yardId?.success ? yardId.data : null);
  context.user = caller.user;
  if (typeof route.access === 'object') {
    if (caller.role === null || !yardId?.success) {
      throw notFound('yard');
    }
    const isSelf = route.access.orSelf !== undefined && context.request.params[route.access.orSelf] === caller.user.id;
    if (!isSelf && !mayInYard(caller.role, route.access.yard)) {
      throw forbidden();
    }
    context.role = caller.role;
    context.yardId = yardId.data;
  }
}

function checkedKey(key: string): string {
  if (!/^[\w-]{8,100}$/.test(key)) {
    throw new AppError('invalid_input', 'The idempotency key is not one.', [{ path: 'Idempotency-Key', message: 'Use 8 to 100 letters, digits, hyphens.', code: 'custom' }]);
  }
  return key;
}

function parse(schema: z.ZodType, value: unknown): unknown {
  const parsed = schema.safeParse(value);
  if (!parsed.success) {
    const fields = parsed.error.issues.map((issue) => ({ path: issue.path.map(String).join('.'), message: issue.message, code: issue.code ?? 'custom' }));
    throw new AppError('invalid_input', fields[0]?.message ?? 'Something in that is not right.', fields);
  }
  return parsed.data;
}

/** The exported app: hashed files for ever, pages never stale, every path without a file's ending gets the page. */
function mountWeb(server: Express, webDir: string, isDemonstration: boolean): void {
  server.use('/', expressStaticGzip(webDir, {
    enableBrotli: true, orderPreference: ['br', 'gz'], index: false,
    serveStatic: {
      setHeaders: (response, file) => {
        const forever = file.includes(`${path.sep}_expo${path.sep}static${path.sep}`) || file.includes(`${path.sep}fonts${path.sep}`);
        response.setHeader('Cache-Control', forever ? 'public, max-age=31536000, immutable' : 'no-cache');
      },
    },
  }));
  server.get('/{*path}', (request, response, next) => {
    if (path.extname(request.path) !== '' || !request.accepts('html')) {
      throw notFound('file');
    }
    if (isDemonstration) {
      // Read by boot.js before the first paint; says nothing about anybody.
      response.setHeader('Set-Cookie', 'dapple_demonstration=yes; Path=/; SameSite=Strict');
    }
    request.url = '/index.html';
    next();
  }, expressStaticGzip(webDir, { enableBrotli: true, orderPreference: ['br', 'gz'], index: false, serveStatic: { setHeaders: (response) => { response.setHeader('Cache-Control', 'no-cache'); } } }));
}
