/** Stamped into every result, so that a change of the engine is seen in what it changed. */
export const ENGINE = { name: 'tallybarn', version: '0.3.0' } as const;
