import { z } from 'zod';
import { ERROR_CODES } from '#shared/errors.ts';

/** RFC 9457 problem document; `errors[].path` is a JSON Pointer (RFC 6901) into what was sent. */
export const problemSchema = z
  .object({
    type: z.string(),
    title: z.string(),
    status: z.int(),
    detail: z.string(),
    code: z.enum(ERROR_CODES),
    errors: z.array(z.object({ path: z.string(), message: z.string() })).optional(),
  })
  .meta({ id: 'Problem' });
export type Problem = z.infer<typeof problemSchema>;
