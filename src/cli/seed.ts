// A seed for a run that was given none: short enough to retype from a report.
import { randomBytes } from 'node:crypto';

// 32 signs without the look-alikes i, l, o and u, so that a byte's lowest five bits pick one evenly.
const signs = '0123456789abcdefghjkmnpqrstvwxyz';

/** Ten signs, 50 bits from the system's generator. */
export const freshSeed = (): string => Array.from(randomBytes(10), (byte) => signs[byte & 31]).join('');
