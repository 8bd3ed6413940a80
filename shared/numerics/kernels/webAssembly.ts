export interface WebAssemblyMemory {
  readonly buffer: ArrayBuffer;
  grow(pages: number): number;
}

/** A compiled module; opaque. */
export type WebAssemblyModule = Readonly<Record<never, unknown>>;

/** The part of WebAssembly that is used here. */
interface WebAssemblyApi {
  readonly Memory: new (limits: { initial: number }) => WebAssemblyMemory;
  readonly Module: new (bytes: Uint8Array<ArrayBuffer>) => WebAssemblyModule;
  readonly Instance: new (
    module: WebAssemblyModule,
    imports: Readonly<Record<string, Readonly<Record<string, unknown>>>>,
  ) => { readonly exports: unknown };
  validate(bytes: Uint8Array<ArrayBuffer>): boolean;
}

/** Every engine has it, while `shared` sees the types of neither browsers nor Node. */
export const { WebAssembly: webAssembly } = globalThis as unknown as {
  readonly WebAssembly: WebAssemblyApi;
};
