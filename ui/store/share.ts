/** A work packed into the fragment of a link, and back. Nothing is sent anywhere: a fragment stays in the browser. */
import { asWork, type Work } from './work.ts';

/** Longest fragment that is made, characters: browsers take it, mail and chat mostly do not cut it (engineering judgement). */
export const LONGEST_LINK = 32_000;
const MARK = '#case=';
/** Largest text that is unpacked, bytes; a link can be made by anyone. */
const LARGEST = 20e6;

/** A fragment, or why there is none. */
export type Packed = { readonly ok: true; readonly fragment: string } | { readonly ok: false; readonly length: number };

/** Packs a work; refused when the link would be longer than `LONGEST_LINK`. */
export async function packWork(work: Work): Promise<Packed> {
  const bytes = new TextEncoder().encode(JSON.stringify(work));
  const packed = await passThrough(bytes, new CompressionStream('deflate-raw'));
  const fragment = MARK + toBase64Url(packed);
  return fragment.length > LONGEST_LINK ? { ok: false, length: fragment.length } : { ok: true, fragment };
}

/** The work in a fragment; undefined when it holds none, or a damaged one. */
export async function unpackWork(fragment: string): Promise<Work | undefined> {
  if (!fragment.startsWith(MARK)) return undefined;
  try {
    const bytes = await passThrough(fromBase64Url(fragment.slice(MARK.length)), new DecompressionStream('deflate-raw'));
    return asWork(JSON.parse(new TextDecoder('utf-8', { fatal: true }).decode(bytes)));
  } catch {
    return undefined;
  }
}

/** Whether a fragment claims to hold a work. */
export function isShared(fragment: string): boolean {
  return fragment.startsWith(MARK);
}

async function passThrough(
  bytes: Uint8Array<ArrayBuffer>,
  stream: CompressionStream | DecompressionStream,
): Promise<Uint8Array<ArrayBuffer>> {
  const reader = new Blob([bytes]).stream().pipeThrough(stream).getReader();
  const parts: Uint8Array<ArrayBuffer>[] = [];
  let length = 0;
  for (;;) {
    const { done, value } = await reader.read();
    if (done) break;
    length += value.length;
    if (length > LARGEST) throw new RangeError('too large');
    parts.push(value);
  }
  const out = new Uint8Array(length);
  let at = 0;
  for (const part of parts) {
    out.set(part, at);
    at += part.length;
  }
  return out;
}

function toBase64Url(bytes: Uint8Array): string {
  let text = '';
  for (const byte of bytes) text += String.fromCharCode(byte);
  return btoa(text).replaceAll('+', '-').replaceAll('/', '_').replace(/=+$/, '');
}

function fromBase64Url(text: string): Uint8Array<ArrayBuffer> {
  const plain = atob(text.replaceAll('-', '+').replaceAll('_', '/'));
  return Uint8Array.from(plain, (c) => c.charCodeAt(0));
}
