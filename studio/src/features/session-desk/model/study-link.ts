import type { SessionStudyInput } from '@voltiplano/engine';
import { readStudyFile, type OpenedFile } from './study-file.ts';

/** Longest link made; longer ones are cut by mail programs and chat windows. */
export const LINK_MAX_BYTES = 8192;

const HASH_KEY = 'study=';

/**
 * A link that carries a study in its hash, which never reaches a server.
 *
 * @param page  address of the desk, without a hash
 */
export async function studyLink(
  study: SessionStudyInput,
  page: string,
): Promise<{ link: string } | { refusal: string }> {
  const packed = await through(new CompressionStream('deflate-raw'), new TextEncoder().encode(JSON.stringify(study)));
  const link = `${page}#${HASH_KEY}${toBase64Url(packed)}`;
  if (link.length <= LINK_MAX_BYTES) return { link };
  const kb = (link.length / 1024).toFixed(1);
  return { refusal: `This study is too long for a link (${kb} kB, at most 8 kB). Save the study and send the file.` };
}

/** The study a hash carries; undefined where it carries none. */
export async function studyFromHash(hash: string): Promise<OpenedFile | undefined> {
  const start = hash.indexOf(HASH_KEY);
  if (start < 0) return undefined;
  try {
    const packed = fromBase64Url(hash.slice(start + HASH_KEY.length));
    const text = new TextDecoder().decode(await through(new DecompressionStream('deflate-raw'), packed));
    return readStudyFile(text);
  } catch {
    const message = 'This link is broken: the study in it cannot be read. Ask for it again, or for the study file';
    return { issues: [{ path: '', rule: 'link', message }] };
  }
}

async function through(
  stream: CompressionStream | DecompressionStream,
  bytes: Uint8Array<ArrayBuffer>,
): Promise<Uint8Array> {
  const writer = stream.writable.getWriter();
  // A broken stream fails on both ends; reading reports it.
  const written = writer.write(bytes).then(() => writer.close());
  written.catch(() => undefined);
  return new Uint8Array(await new Response(stream.readable).arrayBuffer());
}

function toBase64Url(bytes: Uint8Array): string {
  const binary = Array.from(bytes, (byte) => String.fromCharCode(byte)).join('');
  return btoa(binary).replace(/\+/g, '-').replace(/\//g, '_').replace(/=+$/, '');
}

function fromBase64Url(text: string): Uint8Array<ArrayBuffer> {
  const binary = atob(text.replace(/-/g, '+').replace(/_/g, '/'));
  return Uint8Array.from(binary, (letter) => letter.charCodeAt(0));
}
