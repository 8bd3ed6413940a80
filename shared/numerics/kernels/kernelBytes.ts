import { KERNELS_BASE64 } from './kernels.generated.ts';

const ALPHABET = 'ABCDEFGHIJKLMNOPQRSTUVWXYZabcdefghijklmnopqrstuvwxyz0123456789+/';

/** The WebAssembly module with the kernels. Decoded here, for `shared` knows neither Buffer nor atob. */
export function kernelBytes(): Uint8Array<ArrayBuffer> {
  const text = KERNELS_BASE64.replace(/=+$/, '');
  const bytes = new Uint8Array((text.length * 3) >> 2);
  const value = new Map([...ALPHABET].map((letter, i) => [letter, i]));
  let bits = 0;
  let held = 0;
  let at = 0;
  for (const letter of text) {
    bits = ((bits << 6) | value.get(letter)!) & 0xffffff;
    held += 6;
    if (held < 8) continue;
    held -= 8;
    bytes[at++] = (bits >> held) & 0xff;
  }
  return bytes;
}
