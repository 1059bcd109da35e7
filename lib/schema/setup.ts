import { z } from 'zod';
import { CAN_WAIT, SETUP_STEPS } from '@/lib/analysis/setup';

/** Steps that were put off, whole: what is not named here is taken up again. */
export const SetupPutOff = z.strictObject({
  putOff: z
    .array(z.enum(CAN_WAIT, { error: `Name a step that can wait: ${CAN_WAIT.join(', ')}.` }))
    .max(CAN_WAIT.length, `At most ${CAN_WAIT.length} steps.`),
});
export const Setup = z.strictObject({
  steps: z.array(
    z.strictObject({
      step: z.enum(SETUP_STEPS),
      state: z.enum(['done', 'open', 'put-off', 'waits']),
      /** Steps that must come before. */
      for: z.array(z.enum(SETUP_STEPS)),
    }),
  ),
});
export type Setup = z.infer<typeof Setup>;
