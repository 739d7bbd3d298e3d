import { z } from 'zod';
import {
  displayUnitSchema,
  emailSchema,
  idSchema,
  instantSchema,
  neededWords,
  words,
} from './primitives.ts';

export const ROLES = ['owner', 'office', 'technician'] as const;
export const roleSchema = z.enum(ROLES);
export type Role = z.infer<typeof roleSchema>;

/** Long rather than odd; anything typed counts, nothing is cut off. */
export const newPasswordSchema = z
  .string()
  .min(12, 'Use at least 12 characters')
  .max(256, 'Use at most 256 characters');

export const signInSchema = z.object({
  email: z.string().trim().min(1, 'Enter your e-mail address').max(254),
  password: z.string().min(1, 'Enter your password').max(256),
});
export type SignIn = z.infer<typeof signInSchema>;

export const personSchema = z.object({
  id: idSchema,
  name: z.string(),
  email: z.string(),
  role: roleSchema,
  disabledAtMs: instantSchema.nullable(),
});
export type Person = z.infer<typeof personSchema>;

export const shopSchema = z.object({
  name: z.string(),
  town: z.string(),
  phone: z.string(),
  email: z.string(),
  /** IANA name, e.g. America/New_York. */
  zone: z.string(),
  unit: displayUnitSchema,
  minCycles: z.int(),
});
export type Shop = z.infer<typeof shopSchema>;

/** Who is signed in, and where. */
export const sessionSchema = z.object({ person: personSchema, shop: shopSchema });
export type Session = z.infer<typeof sessionSchema>;

export const newPersonSchema = z.object({
  name: neededWords(80, 'a name'),
  email: emailSchema,
  role: roleSchema,
  password: newPasswordSchema,
});
export type NewPerson = z.infer<typeof newPersonSchema>;

export const passwordChangeSchema = z.object({
  current: z.string().min(1, 'Enter your present password').max(256),
  next: newPasswordSchema,
});
export type PasswordChange = z.infer<typeof passwordChangeSchema>;

export const shopChangeSchema = z.object({
  name: neededWords(80, 'the shop’s name'),
  town: words(80),
  phone: words(40),
  email: words(254),
  zone: neededWords(60, 'a time zone'),
  unit: displayUnitSchema,
  minCycles: z.int('Enter a whole number').min(1, 'At least 1').max(20, 'At most 20'),
});
export type ShopChange = z.infer<typeof shopChangeSchema>;

/** All that the sign-in page says of the shop; empty words where none was set up yet. */
export const shopCardSchema = shopSchema.pick({ name: true, town: true });
export type ShopCard = z.infer<typeof shopCardSchema>;
