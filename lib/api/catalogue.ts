import { z } from 'zod';
import { faultsOfPumpPoints, type PumpPoint } from '@/lib/catalogue/pump-points';
import { faultsOfValvePoints } from '@/lib/catalogue/valve-points';
import { kvTableSchema } from '@/lib/network/drawing';

/**
 * The organisation's own valves and pumps. A drawing takes a copy of what it chooses, so nothing here ever changes a loop; the version
 * keeps two people from overwriting each other.
 */

export const MOST_SIZES = 40;

const name = z
  .string()
  .trim()
  .min(1, 'Give it a name.')
  .max(80, 'A name has up to 80 characters.')
  .refine((text) => !/^generic\b/i.test(text), '“Generic” marks Evenhead’s own data: begin with another word.');
const source = z.string().trim().min(1, 'Say where the figures come from.').max(500, 'Up to 500 characters.');

export const valveSizeSchema = z
  .object({
    nominal: z.string().trim().min(1, 'A size is needed.').max(20, 'A size has up to 20 characters.'),
    /** Smallest step of the handwheel's scale, turns; null where any setting can be set. */
    stepTurns: z.number().positive('A step is above 0.').max(100).nullable(),
    points: kvTableSchema,
  })
  .superRefine(({ points }, context) => {
    for (const { index, column, message } of faultsOfValvePoints(points))
      context.addIssue({ code: 'custom', path: ['points', index, column], message });
  });
export type ValveSize = z.infer<typeof valveSizeSchema>;

export const describedSchema = z.object({ name, source });

/** POST /api/catalogue/valve-families */
export const valveFamilySchema = describedSchema
  .extend({ sizes: z.array(valveSizeSchema).min(1, 'A family has one size or more.').max(MOST_SIZES) })
  .superRefine(({ sizes }, context) => {
    sizes.forEach(({ nominal }, index) => {
      if (sizes.findIndex((size) => size.nominal === nominal) < index)
        context.addIssue({ code: 'custom', path: ['sizes', index, 'nominal'], message: `The size ${nominal} stands there twice.` });
    });
  });
export type ValveFamilyInput = z.infer<typeof valveFamilySchema>;

const pumpPointSchema: z.ZodType<PumpPoint> = z.object({
  flowLs: z.number(),
  headM: z.number(),
  efficiency: z.number().nullable(),
  suctionHeadM: z.number().nullable(),
});

/** POST /api/catalogue/pumps */
export const cataloguePumpSchema = describedSchema
  .extend({ points: z.array(pumpPointSchema).max(1000) })
  .superRefine(({ points }, context) => {
    for (const { index, column, message } of faultsOfPumpPoints(points))
      context.addIssue({ code: 'custom', path: ['points', index, column], message });
  });
export type PumpInput = z.infer<typeof cataloguePumpSchema>;

/** The version that the person looked at; another one by now is a conflict. */
const seenSchema = z.object({ version: z.number().int().positive() });
/** PUT /api/catalogue/valve-families/:familyId and /api/catalogue/pumps/:pumpId */
export const replaceValveFamilySchema = valveFamilySchema.and(seenSchema);
export const replacePumpSchema = cataloguePumpSchema.and(seenSchema);
/** DELETE of either. */
export const removeSchema = seenSchema;

interface Versioned {
  id: string;
  version: number;
  changedBy: string;
  /** ISO. */
  changedAt: string;
}
export interface ValveFamily extends ValveFamilyInput, Versioned {}
export interface CataloguePump extends PumpInput, Versioned {}

/** GET /api/catalogue */
export interface CatalogueBody {
  valveFamilies: ValveFamily[];
  pumps: CataloguePump[];
}
