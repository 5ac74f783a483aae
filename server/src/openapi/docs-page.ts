import type { oas31 } from 'zod-openapi';
import { escapeHtml, htmlPage } from '../http/html-page.ts';

const METHODS = ['get', 'post', 'put', 'patch', 'delete'] as const;

type Operation = { method: string; path: string; operation: oas31.OperationObject };

/** The OpenAPI document as one page to read, without scripts. */
export function docsPage(document: oas31.OpenAPIObject): string {
  const operations = Object.entries(document.paths ?? {}).flatMap(([path, item]) => operationsOf(path, item));
  const tags = [...new Set(operations.map(({ operation }) => operation.tags?.[0] ?? ''))];
  const sections = tags.map((tag) => section(tag, operations));
  const schemas = Object.entries(document.components?.schemas ?? {}).map(([name, schema]) =>
    schemaArticle(name, schema),
  );
  return htmlPage(
    document.info.title,
    `<p>${prose(document.info.description)}</p>
<p>All paths stand below <code>/api/v1</code>. For programs: <a href="/api/v1/openapi.json">openapi.json</a>.</p>
${sections.join('\n')}
<h2 id="schemas">Schemas</h2>
${schemas.join('\n')}`,
  );
}

function operationsOf(path: string, item: oas31.PathItemObject): Operation[] {
  return METHODS.flatMap((method) => {
    const operation = item[method];
    return operation ? [{ method, path, operation }] : [];
  });
}

function section(tag: string, operations: readonly Operation[]): string {
  const own = operations.filter(({ operation }) => operation.tags?.[0] === tag);
  return `<h2>${escapeHtml(tag)}</h2>\n${own.map(operationArticle).join('\n')}`;
}

function operationArticle({ method, path, operation }: Operation): string {
  const { operationId = '', summary, description, parameters = [], requestBody, responses = {}, security } = operation;
  const rows = [
    ...parameters.map((parameter) => parameterRow(parameter as oas31.ParameterObject)),
    ...(requestBody ? [row('body', contentOf(requestBody as oas31.RequestBodyObject))] : []),
    ...Object.entries(responses).map(([status, response]) => responseRow(status, response as oas31.ResponseObject)),
  ];
  return `<article id="${escapeHtml(operationId)}"><h3><code>${method.toUpperCase()} ${escapeHtml(path)}</code></h3>
<p>${prose(summary)}. ${whoMay(security)} ${prose(description)}</p>
<table>${rows.join('')}</table></article>`;
}

function whoMay(security: oas31.SecurityRequirementObject[] = []): string {
  if (security.length === 0) return 'Open to anyone.';
  return security.some((one) => 'apiToken' in one) ? 'By session or API token.' : 'By session only.';
}

function parameterRow({ name, in: place, required, schema, description }: oas31.ParameterObject): string {
  const type = `${typeOf(schema)}${required ? '' : ', optional'}`;
  return row(`${place} <code>${escapeHtml(name)}</code>`, [type, prose(description)].filter(Boolean).join('<br>'));
}

function responseRow(status: string, response: oas31.ResponseObject): string {
  return row(status, [prose(response.description), contentOf(response)].filter(Boolean).join('<br>'));
}

function contentOf({ content = {} }: { content?: oas31.ContentObject }): string {
  return Object.values(content)
    .map(({ schema }) => typeOf(schema))
    .join(', ');
}

function schemaArticle(name: string, schema: oas31.SchemaObject | oas31.ReferenceObject): string {
  const description = prose((schema as oas31.SchemaObject).description);
  return `<article id="schema-${escapeHtml(name)}"><h3><code>${escapeHtml(name)}</code></h3>
<p>${description}</p><p>${typeOf(schema)}</p></article>`;
}

/** A schema in short words: fields with their types, links to named schemas, limits where there are any. */
function typeOf(schema: unknown): string {
  if (typeof schema !== 'object' || schema === null) return 'anything';
  const {
    $ref,
    type,
    properties,
    required = [],
    items,
    anyOf,
    oneOf,
    enum: values,
    const: value,
  } = schema as {
    $ref?: string;
    type?: string | string[];
    properties?: Record<string, unknown>;
    required?: string[];
    items?: unknown;
    anyOf?: unknown[];
    oneOf?: unknown[];
    enum?: unknown[];
    const?: unknown;
  };
  if ($ref) return schemaLink($ref);
  if (anyOf ?? oneOf) return (anyOf ?? oneOf ?? []).map(typeOf).join(' or ');
  if (values) return values.map((one) => `<code>${escapeHtml(JSON.stringify(one))}</code>`).join(', ');
  if (value !== undefined) return `<code>${escapeHtml(JSON.stringify(value))}</code>`;
  if (items) return `list of ${typeOf(items)}`;
  if (properties) return fieldTable(properties, required);
  return `${[type ?? 'anything'].flat().join(' or ')}${limitsOf(schema)}`;
}

function fieldTable(properties: Record<string, unknown>, required: readonly string[]): string {
  const rows = Object.entries(properties).map(([name, schema]) => {
    const description = prose((schema as { description?: string }).description);
    const optional = required.includes(name) ? '' : ', optional';
    return row(
      `<code>${escapeHtml(name)}</code>`,
      `${typeOf(schema)}${optional}${description ? `<br>${description}` : ''}`,
    );
  });
  return `<table>${rows.join('')}</table>`;
}

function limitsOf(schema: object): string {
  const shown = ['format', 'minLength', 'maxLength', 'minimum', 'maximum', 'default'];
  const limits = Object.entries(schema).filter(([name]) => shown.includes(name));
  return limits.map(([name, value]) => `, ${name} ${escapeHtml(String(value))}`).join('');
}

function schemaLink(ref: string): string {
  const name = escapeHtml(ref.split('/').at(-1) ?? ref);
  return `<a href="#schema-${name}">${name}</a>`;
}

function row(head: string, cell: string): string {
  return `<tr><th scope="row">${head}</th><td>${cell}</td></tr>`;
}

/** Text with `code` in it. */
function prose(text = ''): string {
  return escapeHtml(text)
    .replace(/`([^`]+)`/g, '<code>$1</code>')
    .replaceAll('\n', '<br>');
}
