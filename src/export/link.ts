import { writeDesign } from '../design/write.ts';
import type { Design } from '../design/types.ts';

/**
 * A design inside a link: the text of its file, compressed (RFC 1951), in the alphabet for addresses (RFC 4648, section 5), behind "#design=". A browser sends no server what stands behind "#".
 */
const KEY = '#design=';
/** More than this is not unpacked, bytes: a few characters of a hostile link can unpack to gigabytes. The reader of designs takes no more either. */
const MOST_BYTES = 5e6;

/** @param page  address of the page; what stands behind its "#" is replaced */
export async function linkTo(design: Design, page: string): Promise<string> {
  const packed = new Blob([writeDesign(design)]).stream().pipeThrough(new CompressionStream('deflate-raw'));
  const bytes = new Uint8Array(await new Response(packed).arrayBuffer());
  let binary = '';
  for (const byte of bytes) binary += String.fromCharCode(byte);
  const text = btoa(binary).replaceAll('+', '-').replaceAll('/', '_').replaceAll('=', '');
  return `${page.replace(/#.*$/s, '')}${KEY}${text}`;
}

/** Whether an address carries a design. */
export function carriesDesign(address: string): boolean {
  return address.includes(KEY);
}

/**
 * The text of the design in an address; whether it is a good one is for the reader to say.
 * @throws {Error} with a sentence: the link was cut short or altered, or unpacks to more than any design has
 */
export async function textOfLink(address: string): Promise<string> {
  const packed = address.slice(address.indexOf(KEY) + KEY.length);
  let bytes: Uint8Array<ArrayBuffer>;
  try {
    bytes = Uint8Array.from(atob(packed.replaceAll('-', '+').replaceAll('_', '/')), (character) => character.charCodeAt(0));
  } catch {
    throw new Error('The link holds no design: it was cut short or altered on its way.');
  }
  const parts: Uint8Array<ArrayBuffer>[] = [];
  let size = 0;
  const reader = new Blob([bytes]).stream().pipeThrough(new DecompressionStream('deflate-raw')).getReader();
  for (;;) {
    const { done, value } = await reader.read().catch(() => {
      throw new Error('The link holds no design: it was cut short or altered on its way.');
    });
    if (done) break;
    size += value.length;
    if (size > MOST_BYTES) {
      await reader.cancel().catch(() => {});
      throw new Error('The link unpacks to more than any design has, and was not opened.');
    }
    parts.push(value as Uint8Array<ArrayBuffer>);
  }
  return new Blob(parts).text();
}
