import { z } from 'zod';
import { AppError } from '../errors/AppError.ts';
import type { ModeShapes } from './ModeShapes.ts';

/**
 * Mode shapes as compact binary, little-endian:
 *   4 bytes   "RNGS"
 *   4 bytes   unsigned length of the header in bytes
 *   header    UTF-8 JSON: version, points, modes, nodes (ids), members ({id, first, count})
 *   padding   zeros, until the next multiple of 8 from the file's beginning
 *   positions points × 3 32-bit floats, undeformed X Y Z [m]
 *   shapes    modes × points × 6 32-bit floats: u v w rx ry rz, φᵀMφ = 1
 * Points are every node in document order, then each member's stations from start to end.
 */
const MAGIC = 'RNGS';
const VERSION = 1;
const PREFIX = 8;
export const SHAPES_MEDIA_TYPE = 'application/octet-stream';

const count = z.int().nonnegative();
const header = z.object({
  version: z.literal(VERSION),
  points: count,
  modes: count,
  nodes: z.array(z.string()),
  members: z.array(z.object({ id: z.string(), first: count, count })),
});

const padded = (length: number) => Math.ceil(length / 8) * 8;

/** The file of one set of shapes. */
export function encodeShapes(shapes: ModeShapes): Uint8Array<ArrayBuffer> {
  const { points, modes, nodes, members } = shapes;
  const text = utf8(JSON.stringify({ version: VERSION, points, modes, nodes, members }));
  const body = padded(PREFIX + text.length);
  const file = new Uint8Array(body + 4 * points * (3 + 6 * modes));
  const view = new DataView(file.buffer);
  for (let i = 0; i < 4; i++) file[i] = MAGIC.charCodeAt(i);
  view.setUint32(4, text.length, true);
  file.set(text, PREFIX);
  let at = body;
  for (const values of [shapes.positions, shapes.shapes]) {
    for (const value of values) {
      view.setFloat32(at, value, true);
      at += 4;
    }
  }
  return file;
}

/**
 * Reads a file that `encodeShapes` wrote.
 * Throws AppError `invalid-request` for bytes that are no such file, or a damaged one.
 */
export function decodeShapes(file: Uint8Array): ModeShapes {
  const view = new DataView(file.buffer, file.byteOffset, file.byteLength);
  const magic = String.fromCharCode(...file.subarray(0, 4));
  if (file.length < PREFIX || magic !== MAGIC) throw notShapes('It does not begin as one.');
  const headerLength = view.getUint32(4, true);
  if (PREFIX + headerLength > file.length) throw notShapes('It ends inside its header.');
  const parsed = header.safeParse(
    parseJson(fromUtf8(file.subarray(PREFIX, PREFIX + headerLength))),
  );
  if (!parsed.success) throw notShapes('Its header cannot be read.');
  const { points, modes, nodes, members } = parsed.data;
  const body = padded(PREFIX + headerLength);
  if (file.length !== body + 4 * points * (3 + 6 * modes)) {
    throw notShapes('Its length does not fit its header.');
  }
  const read = (length: number, from: number) => {
    const values = new Float32Array(length);
    for (let i = 0; i < length; i++) values[i] = view.getFloat32(from + 4 * i, true);
    return values;
  };
  return {
    nodes,
    members,
    points,
    modes,
    positions: read(points * 3, body),
    shapes: read(modes * points * 6, body + 12 * points),
  };
}

function notShapes(reason: string): AppError {
  return new AppError('invalid-request', `This is not a file of mode shapes. ${reason}`);
}

function parseJson(text: string): unknown {
  try {
    return JSON.parse(text);
  } catch {
    return undefined;
  }
}

/** UTF-8 by the URI functions: TextEncoder is not among the language's own objects, which is all `shared` has. */
function utf8(text: string): Uint8Array {
  const escaped = encodeURIComponent(text);
  const bytes: number[] = [];
  for (let i = 0; i < escaped.length; i++) {
    if (escaped[i] === '%') {
      bytes.push(Number.parseInt(escaped.slice(i + 1, i + 3), 16));
      i += 2;
    } else {
      bytes.push(escaped.charCodeAt(i));
    }
  }
  return Uint8Array.from(bytes);
}

function fromUtf8(bytes: Uint8Array): string {
  let escaped = '';
  for (const byte of bytes) escaped += `%${byte.toString(16).padStart(2, '0')}`;
  try {
    return decodeURIComponent(escaped);
  } catch {
    return '';
  }
}
