import { z } from 'zod';
import { Id } from './common.ts';

/** What a person may be; registrar, assessor and comparison pilot are roles in the network. */
export const Role = z.enum([
  'registrar',
  'laboratory administrator',
  'metrologist',
  'signatory',
  'reader',
  'assessor',
  'comparison pilot',
]);
export type Role = z.infer<typeof Role>;

export const SignInBody = z.strictObject({
  email: z.string().trim().min(3, 'Type the e-mail of your account').max(254),
  password: z.string().min(1, 'Type your password').max(200),
});
export type SignInBody = z.infer<typeof SignInBody>;

const Person = z.object({
  accountId: Id,
  name: z.string(),
  email: z.string(),
  /** Roles held today, with the laboratory where there is one. */
  roles: z.array(
    z.object({
      role: Role,
      laboratory: z
        .object({ id: Id, code: z.string(), name: z.string(), isNationalInstitute: z.boolean() })
        .nullable(),
    }),
  ),
});

/** GET /api/session: who is signed in; `null` without sign-in (200: asking is no failure). */
export const SessionResponse = z.object({
  person: Person.nullable(),
  /** Whether the register holds the demo network. */
  isDemo: z.boolean(),
});
export type SessionResponse = z.infer<typeof SessionResponse>;

export const SignOutResponse = z.object({ signedOut: z.literal(true) });

/** PUT /api/laboratories/:laboratoryId/people/:accountId: grants or ends a role, from a day on. */
export const MembershipBody = z.strictObject({
  role: Role,
  state: z.enum(['granted', 'ended']),
  validFrom: z.iso.date(),
  validTo: z.iso.date().nullable(),
});
export const MembershipResponse = z.object({ id: Id });
