/** Version of the engine's arithmetic, stored beside every computed result so that it can be recomputed later. */
export const ENGINE_VERSION = '1.0.0';
