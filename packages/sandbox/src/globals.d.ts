/** Text of the script of `inside`, put in by build.mjs. */
declare const SANDBOX_INSIDE: string;

/** The bytes of the module, put in by build.mjs. */
declare module '@jitl/quickjs-wasmfile-release-sync/wasm';
