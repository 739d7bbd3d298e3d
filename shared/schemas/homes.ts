import { z } from 'zod';
import { idSchema, instantSchema, neededWords, words } from './primitives.ts';
import { ratingSchema } from './ratings.ts';

export const newCustomerSchema = z.object({
  name: neededWords(120, 'a name'),
  phone: words(40),
  email: words(254),
  notes: words(2000),
});
export type NewCustomer = z.infer<typeof newCustomerSchema>;
export const customerSchema = newCustomerSchema.extend({ id: idSchema });
export type Customer = z.infer<typeof customerSchema>;

export const newHomeSchema = z.object({
  customerId: idSchema,
  address: neededWords(200, 'an address'),
  town: words(80),
  accessNotes: words(2000),
});
export type NewHome = z.infer<typeof newHomeSchema>;
export const homeSchema = newHomeSchema.extend({ id: idSchema });
export type Home = z.infer<typeof homeSchema>;

export const FUELS = ['electric', 'gas'] as const;
export const CONTROLS = ['thermostat', 'thermistor'] as const;
export const HEAT_SETTINGS = ['high', 'medium', 'low'] as const;
export const heatSettingSchema = z.enum(HEAT_SETTINGS);
export type HeatSetting = z.infer<typeof heatSettingSchema>;

export const newMachineSchema = z.object({
  homeId: idSchema,
  make: neededWords(60, 'the make'),
  model: words(60),
  serial: words(60),
  fuel: z.enum(FUELS),
  control: z.enum(CONTROLS),
  ratedVolts: z.number('Enter a number').positive().max(1000).nullable(),
  ratedWatts: z.number('Enter a number').positive().max(100_000).nullable(),
  place: words(80),
});
export type NewMachine = z.infer<typeof newMachineSchema>;
export const machineSchema = newMachineSchema.extend({ id: idSchema });
export type Machine = z.infer<typeof machineSchema>;

/** The cycling thermostat (or thermistor set-point) that a machine is specified to have for a heat setting. */
export const newSpecifiedRatingSchema = z.object({
  setting: heatSettingSchema,
  ratingId: idSchema,
  /** The safety that watches the exhaust; null: the default high limit. */
  limitRatingId: idSchema.nullable(),
});
export type NewSpecifiedRating = z.infer<typeof newSpecifiedRatingSchema>;
export const specifiedRatingSchema = z.object({
  setting: heatSettingSchema,
  rating: ratingSchema,
  limit: ratingSchema.nullable(),
});
export type SpecifiedRating = z.infer<typeof specifiedRatingSchema>;

export const newFittedPartSchema = z.object({
  ratingId: idSchema,
  visitId: idSchema.nullable(),
  fittedAtMs: instantSchema,
  supplier: words(80),
  lot: words(60),
});
export type NewFittedPart = z.infer<typeof newFittedPartSchema>;
export const fittedPartSchema = newFittedPartSchema.omit({ ratingId: true }).extend({
  id: idSchema,
  rating: ratingSchema,
  removedAtMs: instantSchema.nullable(),
  removedWhy: z.string(),
});
export type FittedPart = z.infer<typeof fittedPartSchema>;

/** What is said when a part comes out. */
export const removedPartSchema = z.object({
  removedAtMs: instantSchema,
  removedWhy: neededWords(200, 'why it came out'),
});
export type RemovedPart = z.infer<typeof removedPartSchema>;

/** A machine with all that is known of it. Its runs come from `/api/machines/:id/runs`. */
export const machinePageSchema = machineSchema.extend({
  home: homeSchema,
  customer: customerSchema,
  specified: z.array(specifiedRatingSchema),
  fitted: z.array(fittedPartSchema),
});
export type MachinePage = z.infer<typeof machinePageSchema>;

export const homeListItemSchema = homeSchema.extend({
  customer: customerSchema,
  machines: z.array(machineSchema),
});
export const homeListSchema = z.array(homeListItemSchema);
export type HomeListItem = z.infer<typeof homeListItemSchema>;
