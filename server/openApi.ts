import path from 'node:path';
import express, { type Router } from 'express';
import { createDocument, type ZodOpenApiObject, type ZodOpenApiPathsObject } from 'zod-openapi';
import type { Access, Route } from '@/server/routes/route';
import { errorResponseSchema } from '@/shared/contracts/common';
import type { z } from '@/shared/zod';

function accessText(access: Access): string {
  if (access === 'public') {
    return 'Anyone may call this.';
  }
  if (access === 'signed_in') {
    return 'For any signed-in person.';
  }
  if (access === 'demonstration') {
    return 'Only in the demonstration.';
  }
  const self = access.orSelf === undefined ? '' : ' A member may do it to themself.';
  return `For members of the yard who may do \`${access.yard}\`.${self}`;
}

/** OpenAPI 3.1 description of the API, made from the same contracts that check every request and answer. */
export function describeApi(routes: Route[]): ReturnType<typeof createDocument> {
  const paths: ZodOpenApiPathsObject = {};
  for (const route of routes) {
    const pathText = `/api${route.path.replace(/:(\w+)/g, '{$1}')}`;
    const failure = { description: 'The request was refused; `code` says why.', content: { 'application/json': { schema: errorResponseSchema } } };
    paths[pathText] = {
      ...paths[pathText],
      [route.method]: {
        tags: [route.tag],
        summary: route.summary,
        description: accessText(route.access),
        ...(route.access === 'public' || route.access === 'demonstration' ? {} : { security: [{ accessToken: [] }] }),
        requestParams: {
          ...(route.params ? { path: route.params as z.ZodObject } : {}),
          ...(route.query ? { query: route.query as z.ZodObject } : {}),
        },
        ...(route.body ? { requestBody: { required: true, content: { 'application/json': { schema: route.body } } } } : {}),
        responses: {
          [String(route.status)]: { description: 'Done.', content: { 'application/json': { schema: route.response } } },
          '4XX': failure,
        },
      },
    };
  }
  const document: ZodOpenApiObject = {
    openapi: '3.1.0',
    info: {
      title: 'Dapple',
      version: '1',
      description: 'Plans, times and records the watering of yards without in-ground sprinklers. Quantities are SI with the unit in the name; instants are UTC; days are civil days of the yard.',
    },
    components: { securitySchemes: { accessToken: { type: 'http', scheme: 'bearer', bearerFormat: 'JWT' } } },
    paths,
  };
  return createDocument(document);
}

const page = `<!doctype html><html lang="en"><head><meta charset="utf-8"><meta name="viewport" content="width=device-width, initial-scale=1">
<title>Dapple: the API</title><link rel="stylesheet" href="docs/assets/swagger-ui.css"></head>
<body><main id="description"></main><script src="docs/assets/swagger-ui-bundle.js"></script><script src="docs/start.js"></script></body></html>`;

const starter = "window.SwaggerUIBundle({ url: '/api/openapi.json', dom_id: '#description', deepLinking: true, validatorUrl: null });";

/** Serves the description as JSON and as a page to read. */
export function mountApiDescription(api: Router, routes: Route[]): void {
  let description: ReturnType<typeof createDocument> | null = null;
  api.get('/openapi.json', (_request, response) => {
    description ??= describeApi(routes);
    response.json(description);
  });
  api.get('/docs', (_request, response) => {
    response.type('html').send(page);
  });
  api.get('/docs/start.js', (_request, response) => {
    response.type('js').send(starter);
  });
  api.use('/docs/assets', express.static(path.dirname(require.resolve('swagger-ui-dist/package.json')), { index: false, maxAge: '1d' }));
}
