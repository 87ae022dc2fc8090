/** Node's Buffer where its types are known, its base elsewhere. */
export type Buffer = typeof globalThis extends { Buffer: { prototype: infer Known } } ? Known : Uint8Array;
