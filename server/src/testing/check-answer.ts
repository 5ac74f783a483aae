import { z } from 'zod';
import type { Endpoint } from '../contract/endpoint.ts';
import { openApiDocument, templateOf } from '../openapi/document.ts';

type JsonSchema = Parameters<typeof z.fromJSONSchema>[0];
type Content = Record<string, { schema: JsonSchema }>;
type Operation = { responses: Record<string, { content?: Content }> };

const document = JSON.parse(
  JSON.stringify(openApiDocument('0.0.0')).replaceAll('#/components/schemas/', '#/$defs/'),
) as { paths: Record<string, Record<string, Operation>>; components: { schemas: Record<string, JsonSchema> } };

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
  const media = Object.entries(response.content).find(([type]) => contentType.startsWith(type));
  if (!media) throw new Error(`${id} answered ${contentType}, which the OpenAPI document does not list.`);
  const $defs = document.components.schemas;
  const schema = z.fromJSONSchema({ ...(media[1].schema as object), $defs } as JsonSchema);
  const checked = schema.safeParse(JSON.parse(text));
  if (!checked.success)
    throw new Error(`${id} answered ${status} against its schema:\n${z.prettifyError(checked.error)}\n${text}`);
}
