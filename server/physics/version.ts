/** Stamped into every result, so that a change of the engine is seen in what it changed. */
export const ENGINE = { name: 'tallybarn', version: '0.2.0' } as const;
