import { z } from 'zod';
import {
  createDocument,
  type ZodOpenApiOperationObject,
  type ZodOpenApiParameters,
  type ZodOpenApiPathsObject,
} from 'zod-openapi';
import { API_VERSION, ERROR_STATUS, PROBLEM_MEDIA_TYPE, Problem } from '#shared/contract/errors.ts';
import type { Endpoint } from '#shared/contract/http/endpoint.ts';
import { IDEMPOTENCY_KEY_HEADER } from './idempotency.ts';

const JSON_TYPE = 'application/json';

/** The interface description (OpenAPI 3.1), made from the same endpoints and shapes that the routes use. */
export function describeInterface(endpoints: readonly Endpoint[]) {
  const paths: ZodOpenApiPathsObject = {};
  for (const endpoint of endpoints) {
    const path = endpoint.path.replace(/:(\w+)/g, '{$1}');
    paths[path] = { ...paths[path], [endpoint.method.toLowerCase()]: describeOperation(endpoint) };
  }
  return createDocument({
    openapi: '3.1.0',
    info: { title: 'Millrace', version: API_VERSION, description: 'The watch desk of a pool-service company.' },
    paths,
    components: { securitySchemes: { session: { type: 'apiKey', in: 'cookie', name: 'millrace-access' } } },
  });
}

/**
 * @example operationIdOf({ method: 'GET', path: '/api/pumps/:pumpId/runs', … }) // 'getPumpsRuns'
 */
function operationIdOf({ method, path }: Endpoint): string {
  const words = path.split('/').filter((part) => part !== '' && part !== 'api' && !part.startsWith(':'));
  const isOne = path.endsWith('Id') ? 'One' : '';
  return `${method.toLowerCase()}${isOne}${words.map((word) => word.charAt(0).toUpperCase() + word.slice(1)).join('')}`;
}

function describeOperation(endpoint: Endpoint): ZodOpenApiOperationObject {
  const { summary, status = 200, response, body, roles } = endpoint;
  const parameters = describeParameters(endpoint);
  return {
    operationId: operationIdOf(endpoint),
    summary,
    ...(roles === 'public' ? {} : { description: `For ${roles.join(', ')}.`, security: [{ session: [] }] }),
    ...(Object.keys(parameters).length === 0 ? {} : { requestParams: parameters }),
    ...(body === undefined ? {} : { requestBody: { required: true, content: { [JSON_TYPE]: { schema: body } } } }),
    responses: {
      [status]:
        status === 204
          ? { description: 'Done' }
          : { description: 'Done', content: { [JSON_TYPE]: { schema: response } } },
      default: {
        description: `A refusal (${Object.entries(ERROR_STATUS)
          .map(([code, number]) => `${number} ${code}`)
          .join(', ')})`,
        content: { [PROBLEM_MEDIA_TYPE]: { schema: Problem } },
      },
    },
  };
}

function describeParameters({ params, query, ifMatch, idempotent }: Endpoint): ZodOpenApiParameters {
  const headers: Record<string, z.ZodType> = {};
  if (ifMatch === true)
    headers['If-Match'] = z.string().meta({ description: 'The tag, or the version in quotes, of what was read' });
  if (idempotent === true) {
    headers[IDEMPOTENCY_KEY_HEADER] = z.string().optional().meta({ description: 'Repeating it repeats the answer' });
  }
  return {
    ...(params instanceof z.ZodObject ? { path: params } : {}),
    ...(query instanceof z.ZodObject ? { query } : {}),
    ...(Object.keys(headers).length > 0 ? { header: z.object(headers) } : {}),
  };
}
