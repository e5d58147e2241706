import { z } from 'zod';
import { textSchema } from './text.ts';

/** Up to `sound` the verdict is sound, up to `usable` it is usable, beyond it is not valid. */
function limits(most: number, what: string) {
  const bound = (name: string) =>
    z
      .number(`${name} must be a number.`)
      .gt(0, `${name} must be above zero.`)
      .max(most, `${name} may be at most ${most} for ${what}.`);
  return z
    .strictObject({ sound: bound('sound'), usable: bound('usable') })
    .refine(({ sound, usable }) => sound < usable, {
      path: ['usable'],
      message: '“usable” must be above “sound”: what is sound is usable too.',
    });
}

/** Thresholds of the verdict on first order. */
export const verdictThresholdsSchema = z.strictObject({
  /** Relative deviation from the exact calculation. */
  exact: limits(10, 'a relative deviation'),
  /** The largest of the criteria, where there is no exact calculation. */
  criteria: limits(100, 'a criterion'),
});
export type VerdictThresholds = z.infer<typeof verdictThresholdsSchema>;

/** What the lab has decided for everybody. */
export const labSettingsSchema = z.strictObject({ verdict: verdictThresholdsSchema });
export type LabSettings = z.infer<typeof labSettingsSchema>;

export const DEFAULT_SETTINGS: LabSettings = {
  verdict: { exact: { sound: 0.02, usable: 0.2 }, criteria: { sound: 0.1, usable: 1 } },
};

export const changeSettingsSchema = labSettingsSchema
  .extend({ note: textSchema(2000, 'The note').optional() })
  .meta({ id: 'ChangeSettings' });
export type ChangeSettings = z.infer<typeof changeSettingsSchema>;

const changed = z.object({
  at: z.string(),
  by: z.object({ id: z.string(), name: z.string() }),
  note: z.string(),
});

/** Version 0 are the defaults, before anybody changed anything. */
export const settingsSchema = labSettingsSchema
  .extend({ version: z.int(), changed: changed.nullable(), defaults: labSettingsSchema })
  .meta({ id: 'Settings' });
export type Settings = z.infer<typeof settingsSchema>;

/** A version that was set, with what it replaced. */
export const settingsVersionSchema = changed
  .extend({ version: z.int(), before: labSettingsSchema, after: labSettingsSchema })
  .meta({ id: 'SettingsVersion' });
export type SettingsVersion = z.infer<typeof settingsVersionSchema>;
