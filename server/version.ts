import manifest from '../package.json' with { type: 'json' };

/** The product's version, from package.json. */
export const version: string = manifest.version;
