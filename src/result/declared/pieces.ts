// The pieces that every part of the declaration is made of.
import { z } from 'zod';

export const count = z.int().min(0).describe('a whole number from 0 to 2^53 - 1');
export const probability = z.number().min(0).max(1);
/** A number, or the word for an infinite one. */
export const extendedNumber = z.union([z.number(), z.enum(['infinity', '-infinity'])]);
/** SHA-256 of some bytes. */
export const digest = z.string().regex(/^[0-9a-f]{64}$/);
export const level = z.number().gt(0).lt(1);
