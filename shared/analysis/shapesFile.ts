import { z } from 'zod';
import { AppError } from '../errors/AppError.ts';

/**
 * Mode shapes of one solve and the points they are given at: every node of the document in its order, then
 * each member's stations from start to end (divisions + 1 of them, arms and joints taken into account).
 *
 *   positions  points × 3   X Y Z of the undeformed point [m]
 *   shapes     modes × points × 6   u v w [m] and rx ry rz [rad] of each point, scaled to φᵀMφ = 1
 */
export interface ModeShapes {
  readonly points: number;
  readonly modes: number;
  /** Node ids; point i < nodes.length is node i. */
  readonly nodes: readonly string[];
  /** Where each member's stations stand among the points. */
  readonly members: readonly MemberStations[];
  readonly positions: Float32Array;
  readonly shapes: Float32Array;
}

export interface MemberStations {
  readonly id: string;
  readonly first: number;
  readonly count: number;
}

/** Numbers held for one point of one shape. */
export const VALUES_PER_POINT = 6;

const MAGIC = 'RNGS';
const VERSION = 1;
const PREAMBLE_BYTES = 8;
/** Float32 sections begin on this boundary. */
const ALIGNMENT_BYTES = 8;

const whole = z.int().nonnegative();
const header = z.object({
  version: z.literal(VERSION),
  points: whole,
  modes: whole,
  nodes: z.array(z.string()),
  members: z.array(z.object({ id: z.string(), first: whole, count: whole })),
});

/**
 * Layout, little-endian: the four bytes "RNGS"; uint32 length of the header in bytes; the header as JSON in
 * ASCII (other characters escaped), padded with spaces to a multiple of 8; positions; shapes (both float32).
 */
export function encodeShapes(shapes: ModeShapes): Uint8Array<ArrayBuffer> {
  const { points, modes, nodes, members } = shapes;
  const json = escapeToAscii(JSON.stringify({ version: VERSION, points, modes, nodes, members }));
  const headerBytes = Math.ceil(json.length / ALIGNMENT_BYTES) * ALIGNMENT_BYTES;
  const dataAt = PREAMBLE_BYTES + headerBytes;
  const bytes = new Uint8Array(dataAt + 4 * (shapes.positions.length + shapes.shapes.length));
  const view = new DataView(bytes.buffer);
  writeAscii(bytes, 0, MAGIC);
  view.setUint32(4, headerBytes, true);
  writeAscii(bytes, PREAMBLE_BYTES, json.padEnd(headerBytes));
  writeFloats(view, dataAt, shapes.positions);
  writeFloats(view, dataAt + 4 * shapes.positions.length, shapes.shapes);
  return bytes;
}

/**
 * The shapes held in a file made by `encodeShapes`.
 * @throws AppError 'invalid-request' where the bytes are not such a file or do not have the length they state
 */
export function decodeShapes(bytes: Uint8Array): ModeShapes {
  const view = new DataView(bytes.buffer, bytes.byteOffset, bytes.byteLength);
  if (bytes.length < PREAMBLE_BYTES || readAscii(bytes, 0, 4) !== MAGIC) throw notAShapesFile();
  const dataAt = PREAMBLE_BYTES + view.getUint32(4, true);
  if (dataAt > bytes.length) throw notAShapesFile();
  const parsed = header.safeParse(parseJson(readAscii(bytes, PREAMBLE_BYTES, dataAt)));
  if (!parsed.success) throw notAShapesFile();
  const { points, modes, nodes, members } = parsed.data;
  const positionCount = points * 3;
  const shapeCount = modes * points * VALUES_PER_POINT;
  if (bytes.length !== dataAt + 4 * (positionCount + shapeCount)) throw notAShapesFile();
  return {
    points,
    modes,
    nodes,
    members,
    positions: readFloats(view, dataAt, positionCount),
    shapes: readFloats(view, dataAt + 4 * positionCount, shapeCount),
  };
}

function parseJson(text: string): unknown {
  try {
    return JSON.parse(text);
  } catch {
    return undefined;
  }
}

const notAShapesFile = (): AppError =>
  new AppError('invalid-request', 'These bytes are not a complete mode shapes file, version 1.');

function escapeToAscii(json: string): string {
  return json.replace(
    /[^\x20-\x7e]/g,
    (character) => `\\u${character.charCodeAt(0).toString(16).padStart(4, '0')}`,
  );
}

function writeAscii(bytes: Uint8Array, at: number, text: string): void {
  for (let i = 0; i < text.length; i += 1) bytes[at + i] = text.charCodeAt(i);
}

function readAscii(bytes: Uint8Array, from: number, to: number): string {
  const pieces: string[] = [];
  // fromCharCode takes its characters as arguments, of which an engine allows only so many.
  for (let at = from; at < to; at += 4096) {
    pieces.push(String.fromCharCode(...bytes.subarray(at, Math.min(to, at + 4096))));
  }
  return pieces.join('');
}

function writeFloats(view: DataView, at: number, values: Float32Array): void {
  for (let i = 0; i < values.length; i += 1) view.setFloat32(at + 4 * i, values[i] ?? 0, true);
}

function readFloats(view: DataView, at: number, count: number): Float32Array {
  const values = new Float32Array(count);
  for (let i = 0; i < count; i += 1) values[i] = view.getFloat32(at + 4 * i, true);
  return values;
}
