import { z } from 'zod';
import { FINDING_CODES } from '../analysis/analysis.ts';
import { heatSettingSchema } from './homes.ts';
import { idSchema, instantSchema } from './primitives.ts';

const sampleSchema = z.object({ count: z.int(), mean: z.number(), variance: z.number() });
const figureSchema = z
  .object({
    first: sampleSchema,
    second: sampleSchema,
    difference: z.number(),
    within: z.number(),
    pValue: z.number(),
  })
  .nullable();
const differencesSchema = z.object({
  cutOuts: figureSchema,
  overshoots: figureSchema,
  onTimes: figureSchema,
  offTimes: figureSchema,
  swings: figureSchema,
});

/** The comparisons of shared/analysis/compare as they cross the wire. */
const ductPairSchema = z.object({
  verdict: z.enum(['house-duct', 'same-both-ways', 'cannot-tell']),
  signs: z.array(z.enum(['limit-bursts', 'runs-hot', 'more-overshoot', 'short-heats'])),
  why: z.enum(['few-cycles', 'near-the-limit', 'other-way', 'odd-without-duct']).nullable(),
  sharedFault: z.enum(FINDING_CODES).nullable(),
  differences: differencesSchema,
  firstCutOutS: z.object({ off: z.number(), on: z.number() }).nullable(),
});
const settingsPairSchema = z.object({
  verdict: z.enum(['as-it-should', 'no-difference', 'not-enough', 'backwards', 'cannot-tell']),
  why: z.enum(['few-cut-outs', 'limit-cuts', 'wide']).nullable(),
  lowerByK: z.number().nullable(),
  lowerByWithinK: z.number().nullable(),
  expectedK: z.number(),
  expectedFrom: z.enum(['ratings', 'bias-heater']),
  differences: differencesSchema,
});

/** A run that another one is set beside. */
const pairedRunSchema = z.object({ id: idSchema, label: z.string(), startedAtMs: instantSchema });

/** What a run says together with others of the same machine; null where there is none to set it beside. */
export const runPairsSchema = z.object({
  duct: z.object({ off: pairedRunSchema, on: pairedRunSchema, pair: ductPairSchema }).nullable(),
  settings: z
    .object({
      hotter: pairedRunSchema.extend({ setting: heatSettingSchema }),
      cooler: pairedRunSchema.extend({ setting: heatSettingSchema }),
      pair: settingsPairSchema,
    })
    .nullable(),
});
export type RunPairs = z.infer<typeof runPairsSchema>;
