import { z } from 'zod';

/** The body of every answer that is not a success. */
export const errorResponse = z.object({
  error: z.object({
    code: z.string(),
    message: z.string(),
    /** what is wrong where, by field name */
    fields: z.record(z.string(), z.string()).optional(),
  }),
});

export type ErrorResponse = z.infer<typeof errorResponse>;
