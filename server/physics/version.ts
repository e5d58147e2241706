/** Stamped into every result, so that a change of the engine is seen in what it changed. */
export const ENGINE = { name: 'tallybarn', version: '0.1.0' } as const;
