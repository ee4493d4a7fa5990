// A criterion belongs to a practice and applies only to the quantity it was defined for.
import { z } from 'zod';

/** The quantities a criterion can be set on; each check reads exactly one. */
export const criterionQuantities = [
  'exit-gradient-factor', // critical gradient over greatest outward gradient at the exit
  'exit-gradient-averaged-factor', // critical gradient over the gradient averaged over the stated length
  'heave-prism-effective', // submerged weight over seepage force on the prism (Terzaghi)
  'heave-prism-total', // total weight over water force on the base of the prism
  'flotation', // stabilising weight over uplift
  'creep-lane', // weighted creep path over head
] as const;

export const criterionSchema = z
  .object({
    id: z.string().min(1).max(64),
    quantity: z.enum(criterionQuantities),
    /** The value must be at least this. */
    required: z.number().positive('must be greater than 0'),
    title: z.string().min(1, 'must not be empty').max(200),
    source: z.string().min(1, 'say where the value comes from').max(2000),
    /** ISO date of adoption. */
    adopted: z.string().max(32).optional(),
    approvedBy: z.string().max(200).optional(),
    /** A published value shipped with the product, not yet adopted by the practice. */
    example: z.boolean().default(false),
    /** Soil the value is for, where the source says (creep ratios). */
    soil: z.string().max(200).optional(),
  })
  .meta({ id: 'Criterion' });

export type Criterion = z.output<typeof criterionSchema>;
export type CriterionQuantity = Criterion['quantity'];
