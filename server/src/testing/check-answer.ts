import { Ajv2020, type ValidateFunction } from 'ajv/dist/2020.js';
import addFormats from 'ajv-formats';
import type { Endpoint } from '../contract/endpoint.ts';
import { openApiDocument, templateOf } from '../openapi/document.ts';

type Operation = { responses: Record<string, { content?: Record<string, object> }> };

const DOCUMENT = 'openapi.json';
const document = openApiDocument('0.0.0') as unknown as { paths: Record<string, Record<string, Operation>> };

// A validator that shares nothing with what made the document. `strict` refuses keywords it does not know.
const ajv = new Ajv2020({ strict: true, strictRequired: false, allErrors: true });
addFormats(ajv);
// The document is no schema, but schemas stand in it, where references find them.
ajv.addKeyword('openapi').addVocabulary(['info', 'servers', 'paths', 'components']);
ajv.addSchema(document, DOCUMENT);

export type Answered = { status: number; contentType: string; text: string };

/**
 * Holds an answer against the OpenAPI document: status, type and body.
 *
 * @throws if the document does not have it so
 */
export function checkAnswer({ id, method, path }: Endpoint, { status, contentType, text }: Answered): void {
  const response = document.paths[templateOf(path)]?.[method]?.responses[status];
  if (!response) throw new Error(`${id} answered ${status}, which the OpenAPI document does not list: ${text}`);
  if (!response.content) {
    if (text !== '' && status < 300) throw new Error(`${id} answered a body where the document has none: ${text}`);
    return;
  }
  const media = Object.keys(response.content).find((type) => contentType.startsWith(type));
  if (!media) throw new Error(`${id} answered ${contentType}, which the OpenAPI document does not list.`);
  const validate = validatorAt([
    'paths',
    templateOf(path),
    method,
    'responses',
    `${status}`,
    'content',
    media,
    'schema',
  ]);
  if (!validate(JSON.parse(text)))
    throw new Error(`${id} answered ${status} against its schema: ${ajv.errorsText(validate.errors)}\n${text}`);
}

/** The schema that stands at a place in the document. */
function validatorAt(place: readonly string[]): ValidateFunction {
  const pointer = place.map((key) => encodeURIComponent(key.replaceAll('~', '~0').replaceAll('/', '~1'))).join('/');
  const validate = ajv.getSchema(`${DOCUMENT}#/${pointer}`);
  if (!validate) throw new Error(`The OpenAPI document has no schema at ${pointer}.`);
  return validate;
}
