declare const SITEFOLD_VERSION: string;

/** Version of the package, set at build time. */
export const VERSION: string = SITEFOLD_VERSION;
