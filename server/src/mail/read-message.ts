/**
 * Reads subject and text of a message with one plain-text part, as it stands or in base64, which is what this server sends.
 *
 * @param raw  message as it came over SMTP (RFC 5322)
 * @throws if the message has another shape
 */
export function readMessage(raw: string): { subject: string; text: string } {
  const end = raw.indexOf('\r\n\r\n');
  const headers = raw.slice(0, end).replace(/\r\n[ \t]+/g, ' ');
  const encoding = headerOf(headers, 'content-transfer-encoding').toLowerCase();
  return {
    subject: decodeWords(headerOf(headers, 'subject')),
    text: decodeBody(encoding, raw.slice(end + 4)),
  };
}

function decodeBody(encoding: string, body: string): string {
  if (encoding === 'base64') return Buffer.from(body, 'base64').toString('utf8');
  if (encoding === '7bit') return body.replaceAll('\r\n', '\n');
  throw new Error(`A text in ${encoding || 'no stated encoding'} cannot be read.`);
}

function headerOf(headers: string, name: string): string {
  return new RegExp(`^${name}:[ \t]*(.*)$`, 'im').exec(headers)?.[1]?.trim() ?? '';
}

/** Encoded words of RFC 2047; the space between two of them is no part of the text. */
function decodeWords(text: string): string {
  return text
    .replace(/\?=\s+=\?/g, '?==?')
    .replace(/=\?utf-8\?([bq])\?([^?]*)\?=/gi, (_word, kind: string, code: string) =>
      kind.toLowerCase() === 'b' ? Buffer.from(code, 'base64').toString('utf8') : decodeQ(code),
    );
}

function decodeQ(code: string): string {
  const bytes = code
    .replaceAll('_', ' ')
    .replace(/=([0-9a-f]{2})/gi, (_match, hex: string) => String.fromCharCode(Number.parseInt(hex, 16)));
  return Buffer.from(bytes, 'latin1').toString('utf8');
}
