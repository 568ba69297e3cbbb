import { z } from "zod";

/** Resistance in ohms, never negative. */
export const ohmsSchema = z.number().nonnegative().brand<"ohm">();
export type Ohms = z.infer<typeof ohmsSchema>;

/** Direct voltage in volts; a reading may lie a little below zero. */
export const voltsSchema = z.number().brand<"volt">();
export type Volts = z.infer<typeof voltsSchema>;

/** Direct current in amperes; a reading may lie a little below zero. */
export const amperesSchema = z.number().brand<"ampere">();
export type Amperes = z.infer<typeof amperesSchema>;

/** Capacitance in farads. */
export const faradsSchema = z.number().nonnegative().brand<"farad">();
export type Farads = z.infer<typeof faradsSchema>;

/** Marks a number as a resistance. Throws RangeError for a negative or non-finite number. */
export function ohms(value: number): Ohms {
  if (!Number.isFinite(value) || value < 0) throw new RangeError(`a resistance is zero or more ohms, got ${value}`);
  return value as Ohms;
}

/** Marks a number as a voltage. Throws RangeError for a non-finite number. */
export function volts(value: number): Volts {
  if (!Number.isFinite(value)) throw new RangeError(`a voltage is a finite number of volts, got ${value}`);
  return value as Volts;
}

/** Marks a number as a current. Throws RangeError for a non-finite number. */
export function amperes(value: number): Amperes {
  if (!Number.isFinite(value)) throw new RangeError(`a current is a finite number of amperes, got ${value}`);
  return value as Amperes;
}

/** Marks a number as a capacitance. Throws RangeError for a negative or non-finite number. */
export function farads(value: number): Farads {
  if (!Number.isFinite(value) || value < 0) throw new RangeError(`a capacitance is zero or more farads, got ${value}`);
  return value as Farads;
}
