import { z } from 'zod';
import { MEASURES } from './measure.ts';

/** Apart from the names, so that pages that only write a measure do not carry the schema library. */
export const measureSchema = z.enum(MEASURES);
