import { STATUS_CODES } from 'node:http';
import { createDocument, type oas31, type ZodOpenApiOperationObject, type ZodOpenApiPathsObject } from 'zod-openapi';
import type { Endpoint } from '../contract/endpoint.ts';
import { endpoints } from '../contract/endpoints.ts';
import { type ProblemCode, problemCodes, problemSchema } from '../contract/problem.ts';

/** The API as an OpenAPI 3.1 document, made from the schemas that judge every call. */
export function openApiDocument(version: string): oas31.OpenAPIObject {
  return createDocument({
    openapi: '3.1.1',
    info: { title: 'Voltiplano API', version, description: DESCRIPTION },
    servers: [{ url: '/api/v1' }],
    paths: pathsOf(endpoints),
    components: {
      securitySchemes: {
        session: { type: 'apiKey', in: 'cookie', name: 'voltiplano_access', description: 'Set by signing in' },
        apiToken: { type: 'http', scheme: 'bearer', description: 'An API token of a workspace' },
      },
    },
  });
}

const DESCRIPTION = `Every error is application/problem+json with a stable \`code\`. Calls by cookie that change something repeat the
voltiplano_csrf cookie in the X-CSRF-Token header. Calls that create something take an Idempotency-Key: repeated within a
day under the same key, they create nothing more and get the same answer. Calls that change something with versions name
in If-Match the ETag of the version that the change was made from, and are refused where a newer one is there.`;

/** Problems that an endpoint can answer: its own, and those that every call of its kind shares. */
export function problemsOf({
  access,
  method,
  params,
  query,
  body,
  creates,
  ifMatch,
  limited,
  problems,
}: Endpoint): ProblemCode[] {
  const shared: (ProblemCode | false | undefined)[] = [
    access !== 'anyone' && 'NOT_SIGNED_IN',
    access !== 'anyone' && 'ACCESS_EXPIRED',
    access !== 'anyone' && 'SESSION_ENDED',
    access !== 'anyone' && 'API_TOKEN_INVALID',
    access === 'session' && 'SESSION_REQUIRED',
    access !== 'anyone' && access !== 'session' && 'FORBIDDEN',
    params && 'NOT_FOUND',
    method !== 'get' && 'ORIGIN_REFUSED',
    method !== 'get' && access !== 'anyone' && 'CSRF_REFUSED',
    body && 'BAD_REQUEST',
    body && 'BODY_TOO_LARGE',
    (query ?? body ?? creates ?? ifMatch) && 'INVALID_INPUT',
    creates && 'IDEMPOTENCY_MISMATCH',
    ifMatch && 'IF_MATCH_MISSING',
    ifMatch && 'EDIT_CONFLICT',
    limited && 'TOO_MANY_REQUESTS',
    'INTERNAL',
  ];
  return [...new Set([...shared.filter((code) => typeof code === 'string'), ...problems])];
}

function pathsOf(all: readonly Endpoint[]): ZodOpenApiPathsObject {
  const paths: ZodOpenApiPathsObject = {};
  for (const endpoint of all) {
    const path = templateOf(endpoint.path);
    paths[path] = { ...paths[path], [endpoint.method]: operationOf(endpoint) };
  }
  return paths;
}

/** `/workspaces/:workspaceId` as `/workspaces/{workspaceId}`. */
export function templateOf(path: string): string {
  return path.replace(/:(\w+)/g, '{$1}');
}

function operationOf(endpoint: Endpoint): ZodOpenApiOperationObject {
  const { id, tag, summary, access, params, query, body, status, answer, creates, ifMatch } = endpoint;
  const security: oas31.SecurityRequirementObject[] = [{ session: [] }];
  if (access !== 'session') security.push({ apiToken: [] });
  return {
    operationId: id,
    tags: [tag],
    summary,
    description: access === 'anyone' || access === 'session' ? undefined : `Needs the capability \`${access}\`.`,
    security: access === 'anyone' ? [] : security,
    requestParams: { ...(params && { path: params }), ...(query && { query }) },
    parameters: [...(ifMatch ? [IF_MATCH] : []), ...(creates ? [IDEMPOTENCY_KEY] : [])],
    requestBody: body ? { content: { 'application/json': { schema: body } }, required: true } : undefined,
    responses: {
      [status]: {
        description: STATUS_CODES[status] ?? '',
        content: answer ? { 'application/json': { schema: answer } } : undefined,
      },
      ...problemResponses(problemsOf(endpoint)),
    },
  };
}

const IDEMPOTENCY_KEY: oas31.ParameterObject = {
  name: 'Idempotency-Key',
  in: 'header',
  required: false,
  schema: { type: 'string', minLength: 1, maxLength: 200 },
};

const IF_MATCH: oas31.ParameterObject = {
  name: 'If-Match',
  in: 'header',
  required: true,
  description: 'The one ETag that the change was made from, such as `"r3"`; compared strongly, `*` is refused',
  schema: { type: 'string' },
};

function problemResponses(codes: readonly ProblemCode[]) {
  const responses: Record<`${4 | 5}${string}`, { description: string; content: object }> = {};
  for (const status of new Set(codes.map((code) => problemCodes[code].status))) {
    const lines = codes
      .filter((code) => problemCodes[code].status === status)
      .map((code) => `\`${code}\`: ${problemCodes[code].meaning}`);
    responses[`${status}` as `4${string}`] = {
      description: lines.join('\n'),
      content: { 'application/problem+json': { schema: problemSchema } },
    };
  }
  return responses;
}
