// The schemas of the forms, with the sentence each mistake gets. The browser checks with them for speed, the server's
// actions check with the very same ones for truth.
import { z } from 'zod';
import { criterionQuantities } from './criteria';
import { appointmentRoles, practiceRoles, tokenScopes } from './dto';

const line = (what: string, limit = 200) =>
  z.string().trim().min(1, `Write ${what}.`).max(limit, `Keep it to ${limit} characters.`);

const optionalLine = (limit = 200) =>
  z.string().trim().max(limit, `Keep it to ${limit} characters.`).default('');

export const emailSchema = z
  .string()
  .trim()
  .toLowerCase()
  .min(1, 'Write an e-mail address.')
  .max(254, 'Keep it to 254 characters.')
  .pipe(z.email('Write a whole e-mail address, such as name@practice.example.'));

/** Long beats complicated: no rules about kinds of characters. */
export const passwordSchema = z
  .string()
  .min(12, 'Use at least 12 characters. A short sentence is easy to remember.')
  .max(256, 'Keep it to 256 characters.');

export const signInForm = z.object({
  email: emailSchema,
  password: z.string().min(1, 'Write your password.').max(256),
});

export const signUpForm = z.object({
  practiceName: line('the name of your practice: the firm or department'),
  name: line('your name, as it should stand on a record'),
  email: emailSchema,
  password: passwordSchema,
});

export const requestResetForm = z.object({ email: emailSchema });

const token = z.string().min(1).max(200);

export const resetPasswordForm = z.object({ token, password: passwordSchema });

export const acceptInvitationForm = z.object({
  token,
  name: line('your name, as it should stand on a record'),
  password: passwordSchema,
});

const identifier = z.string().min(1).max(64);

export const projectForm = z.object({
  number: line('the job number, such as 24-117', 40),
  name: line('the name of the project'),
  client: optionalLine(),
  description: optionalLine(2000),
});

export const renameProjectForm = projectForm.extend({ projectId: identifier });

export const appointmentForm = z.object({
  projectId: identifier,
  userId: z.string().min(1, 'Choose a person.').max(64),
  role: z.enum(appointmentRoles, 'Choose a part.'),
});

export const newSectionForm = z.object({
  projectId: identifier,
  /** The section document as JSON text; read and checked on the server by `parseSectionText`. */
  text: z.string().min(1, 'Paste a section document, or choose a file.'),
});

export const beginSectionForm = z.object({ projectId: identifier, startingPoint: identifier });

export const inviteForm = z.object({ email: emailSchema, role: z.enum(practiceRoles, 'Choose a role.') });
export const roleForm = z.object({ userId: identifier, role: z.enum(practiceRoles, 'Choose a role.') });
export const personForm = z.object({ userId: identifier });
export const identifierForm = z.object({ id: identifier });

// A number as a person writes it: 1.5 or 1,5 or 3e-5.
const typedNumber = (what: string) =>
  z
    .string()
    .trim()
    .min(1, `Write ${what}.`)
    .transform((typed) => Number(typed.replace(',', '.').replace('−', '-')))
    .refine((value) => Number.isFinite(value), `Write ${what} as a number, such as 1.5.`);

const optionalNumber = (what: string) =>
  z
    .string()
    .trim()
    .default('')
    .transform((typed) => (typed === '' ? undefined : Number(typed.replace(',', '.').replace('−', '-'))))
    .refine(
      (value) => value === undefined || Number.isFinite(value),
      `Write ${what} as a number, or leave it empty.`,
    );

export const criterionForm = z.object({
  /** Empty for a new one. */
  id: z.string().max(64).default(''),
  quantity: z.enum(criterionQuantities, 'Choose what the criterion is on.'),
  required: typedNumber('the least value').refine(
    (value) => value > 0,
    'The least value must be greater than 0.',
  ),
  title: line('a title'),
  source: line('where the value comes from: the standard, its clause, its year', 2000),
  soil: optionalLine(),
});

export const materialForm = z.object({
  /** Empty for a new one. */
  id: z.string().max(64).default(''),
  name: line('a name'),
  kMajor: typedNumber('the permeability').refine(
    (value) => value > 0,
    'A permeability must be greater than 0 m/s.',
  ),
  kMinor: typedNumber('the permeability').refine(
    (value) => value > 0,
    'A permeability must be greater than 0 m/s.',
  ),
  kSource: z.enum([
    'pumping-test',
    'borehole-test',
    'laboratory',
    'grading',
    'published-range',
    'judgement',
    'borrowed',
  ]),
  saturatedUnitWeight: optionalNumber('the unit weight').refine(
    (value) => value === undefined || (value > 0 && value <= 60),
    'A saturated unit weight lies between 0 and 60 kN/m³.',
  ),
  note: optionalLine(2000),
});

export const tokenForm = z.object({
  name: line('what the token is for, so that it can be told apart later'),
  scopes: z.array(z.enum(tokenScopes)).min(1, 'Choose at least one thing it may do.'),
  days: z.coerce
    .number<string>()
    .int()
    .min(1, 'Choose how long it lasts.')
    .max(366, 'A token lasts at most a year.'),
});

export const unitsForm = z.object({ units: z.enum(['si', 'us'], 'Choose a unit system.') });
export const emptyForm = z.object({});
