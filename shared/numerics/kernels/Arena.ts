import { AppError } from '../../errors/AppError.ts';
import type { Kernels } from './Kernels.ts';
import { kernelBytes } from './kernelBytes.ts';
import { scriptKernels } from './scriptKernels.ts';
import { webAssembly } from './webAssembly.ts';
import type { WebAssemblyMemory, WebAssemblyModule } from './webAssembly.ts';

const PAGE = 65_536;
/** Addresses are 32-bit and tables hold them as such. */
const MOST_BYTES = 2 ** 31 - PAGE;
/** An arena larger than this is not kept for the next solve. */
const MOST_KEPT = 2 ** 28;
const ALIGNMENT = 16;

/** One linear memory, filled from the bottom and emptied as a whole, and the kernels over it. */
export interface Arena {
  readonly kernels: Kernels;
  /** Views of the whole memory; they change when it grows, so take them after allocating. */
  readonly f64: Float64Array;
  readonly i32: Int32Array;
  /** Bytes in use. */
  readonly used: number;
  /** Address of room for `count` numbers; what it holds is undefined. Throws AppError `memory-limit`. */
  numbers(count: number): number;
  indices(count: number): number;
  /** Copies an array into the memory and gives its address. */
  place(values: Float64Array): number;
  placeIndices(values: Int32Array): number;
  /** The `count` numbers at an address, as a view. */
  view(address: number, count: number): Float64Array;
  /** Gives up everything allocated after `used` was at this value. */
  rewind(used: number): void;
}

/** Which implementation of the kernels to use; `auto`: SIMD where the engine has it. */
export type KernelChoice = 'auto' | 'script';

/** What is said of a frame whose solve would not fit into the 2 GiB that one linear memory can have. */
export function tooLarge(): AppError {
  const message =
    'The frame is too large: solving it needs more than 2 GiB of memory. Take fewer divisions, or solve it in parts.';
  return new AppError('memory-limit', message, { issues: [{ path: '', message }] });
}

class LinearMemory implements Arena {
  readonly kernels: Kernels;
  f64: Float64Array;
  i32: Int32Array;
  #buffer: ArrayBuffer;
  readonly #memory: WebAssemblyMemory | null;
  // 0 stays free: an address of 0 is never a thing.
  #used = ALIGNMENT;

  constructor(module: WebAssemblyModule | null) {
    this.#memory = module === null ? null : new webAssembly.Memory({ initial: 16 });
    this.#buffer = this.#memory?.buffer ?? new ArrayBuffer(16 * PAGE);
    this.f64 = new Float64Array(this.#buffer);
    this.i32 = new Int32Array(this.#buffer);
    this.kernels =
      module === null
        ? scriptKernels(this)
        : (new webAssembly.Instance(module, {
            env: { memory: this.#memory, abort: () => undefined },
          }).exports as Kernels);
  }

  get used(): number {
    return this.#used;
  }

  numbers(count: number): number {
    return this.#allocate(8 * count);
  }

  indices(count: number): number {
    return this.#allocate(4 * count);
  }

  place(values: Float64Array): number {
    const address = this.numbers(values.length);
    this.f64.set(values, address / 8);
    return address;
  }

  placeIndices(values: Int32Array): number {
    const address = this.indices(values.length);
    this.i32.set(values, address / 4);
    return address;
  }

  view(address: number, count: number): Float64Array {
    return this.f64.subarray(address / 8, address / 8 + count);
  }

  rewind(used: number): void {
    this.#used = used;
  }

  #allocate(bytes: number): number {
    const address = this.#used;
    const end = Math.ceil((address + bytes) / ALIGNMENT) * ALIGNMENT;
    if (end > MOST_BYTES) throw tooLarge();
    if (end > this.#buffer.byteLength) this.#grow(end);
    this.#used = end;
    return address;
  }

  #grow(bytes: number): void {
    // By a quarter more than asked: growing copies in JavaScript.
    const target = Math.min(Math.ceil((1.25 * bytes) / PAGE) * PAGE, MOST_BYTES);
    if (this.#memory === null) {
      const larger = new ArrayBuffer(target);
      new Uint8Array(larger).set(new Uint8Array(this.#buffer));
      this.#buffer = larger;
    } else {
      this.#memory.grow((target - this.#buffer.byteLength) / PAGE);
      this.#buffer = this.#memory.buffer;
    }
    this.f64 = new Float64Array(this.#buffer);
    this.i32 = new Int32Array(this.#buffer);
  }
}

let compiled: WebAssemblyModule | null | undefined;

/** The compiled kernels; null where the engine has no SIMD. */
function compile(): WebAssemblyModule | null {
  if (compiled === undefined) {
    const bytes = kernelBytes();
    compiled = webAssembly.validate(bytes) ? new webAssembly.Module(bytes) : null;
  }
  return compiled;
}

const kept: Partial<Record<KernelChoice, LinearMemory>> = {};

/**
 * Runs `use` with an empty arena, which it must not keep. Memory is kept for the next call in this
 * thread: fresh pages cost as much as a small solve.
 */
export function withArena<Result>(
  use: (arena: Arena) => Result,
  choice: KernelChoice = 'auto',
): Result {
  const arena = kept[choice] ?? newArena(choice);
  delete kept[choice];
  try {
    return use(arena);
  } finally {
    arena.rewind(ALIGNMENT);
    if (arena.f64.byteLength <= MOST_KEPT) kept[choice] = arena;
  }
}

/** An arena of its own, for a caller that keeps it between calls. */
export function newArena(choice: KernelChoice = 'auto'): LinearMemory {
  return new LinearMemory(choice === 'script' ? null : compile());
}
