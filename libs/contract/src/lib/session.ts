import { z } from 'zod';
import { endpoint } from './endpoint';
import { LIMITS } from './limits';
import { ROLES } from './roles';
import { emailInputSchema, hoursSchema, idSchema, instantSchema, nameInputSchema } from './schema-values';

export const UNIT_SYSTEMS = ['us', 'metric'] as const;
/** Where an overtime premium goes: to overhead, or spread over the jobs of the week. */
export const OVERTIME_TO = ['overhead', 'jobs'] as const;
export type OvertimeTo = (typeof OVERTIME_TO)[number];
export const unitsSchema = z.enum(UNIT_SYSTEMS);
export const roleSchema = z.enum(ROLES);

export const shopSchema = z.object({
  shopId: idSchema,
  name: z.string(),
  timeZone: z.string(),
  currency: z.string(),
  units: unitsSchema,
  /** First day of the workweek, 0 = Sunday … 6 = Saturday. */
  weekStart: z.number().int().min(0).max(6),
  /** Hours of a week above which overtime earns a premium; null: none is computed. */
  overtimeThresholdHours: hoursSchema.nullable(),
  /** Where the premium goes. */
  overtimeTo: z.enum(OVERTIME_TO),
});
export type Shop = z.infer<typeof shopSchema>;

const thresholdInputSchema = z
  .string()
  .trim()
  .regex(/^\d{1,3}(\.\d{1,2})?$/, {
    error: 'Write hours with at most 2 decimals, for example 40.',
    abort: true,
  })
  .refine(
    (text) => Number(text) > 0 && Number(text) <= 168,
    'Must be above 0 and at most 168, the hours of a week.',
  );
export const shopPatchSchema = z
  .object({
    name: nameInputSchema,
    timeZone: z.string().trim().min(1).max(60),
    currency: z
      .string()
      .trim()
      .toUpperCase()
      .regex(/^[A-Z]{3}$/, 'Write a currency code of three letters, for example USD.'),
    units: unitsSchema,
    weekStart: z.number().int().min(0).max(6),
    overtimeThresholdHours: thresholdInputSchema.nullable(),
    overtimeTo: z.enum(OVERTIME_TO),
  })
  .partial();
export type ShopPatch = z.infer<typeof shopPatchSchema>;

export const sessionSchema = z.object({
  user: z.object({
    userId: idSchema,
    name: z.string(),
    email: z.string(),
    role: roleSchema,
    mustChangePassword: z.boolean(),
  }),
  shop: shopSchema,
});
export type Session = z.infer<typeof sessionSchema>;

const passwordSchema = z
  .string()
  .min(LIMITS.passwordLengthMin, `At least ${LIMITS.passwordLengthMin} characters.`)
  .max(LIMITS.passwordLengthMax, `At most ${LIMITS.passwordLengthMax} characters.`);

export const signInSchema = z.object({
  email: z.string().max(254),
  password: z.string().max(LIMITS.passwordLengthMax),
});
export const passwordChangeSchema = z.object({
  currentPassword: z.string().max(LIMITS.passwordLengthMax),
  newPassword: passwordSchema,
});

export const userSchema = z.object({
  userId: idSchema,
  name: z.string(),
  email: z.string(),
  role: roleSchema,
  employeeId: idSchema.nullable(),
  isActive: z.boolean(),
  mustChangePassword: z.boolean(),
  lastSignInAt: instantSchema.nullable(),
});
export type User = z.infer<typeof userSchema>;
export const userCreateSchema = z.object({
  name: nameInputSchema,
  email: emailInputSchema,
  role: roleSchema,
  employeeId: idSchema.nullable().default(null),
});
export type UserCreate = z.infer<typeof userCreateSchema>;
export const userPatchSchema = z.object({
  name: nameInputSchema.optional(),
  role: roleSchema.optional(),
  employeeId: idSchema.nullable().optional(),
  isActive: z.boolean().optional(),
});
export type UserPatch = z.infer<typeof userPatchSchema>;
export const userCreatedSchema = z.object({ user: userSchema, temporaryPassword: z.string() });
export type UserCreated = z.infer<typeof userCreatedSchema>;

export const sessionEndpoints = {
  getSession: endpoint({
    method: 'get',
    path: '/session',
    summary: 'Who is signed in, and where',
    permission: 'session.own',
    response: sessionSchema,
  }),
  signIn: endpoint({
    method: 'post',
    path: '/session',
    summary: 'Sign in with e-mail and password',
    permission: null,
    body: signInSchema,
    response: sessionSchema,
  }),
  signOut: endpoint({
    method: 'delete',
    path: '/session',
    summary: 'Sign out',
    permission: 'session.own',
    response: null,
  }),
  changePassword: endpoint({
    method: 'post',
    path: '/session/password',
    summary: 'Change the own password',
    permission: 'session.own',
    body: passwordChangeSchema,
    response: null,
  }),
  getShop: endpoint({
    method: 'get',
    path: '/shop',
    summary: 'The shop and its settings',
    permission: 'shop.view',
    response: shopSchema,
  }),
  updateShop: endpoint({
    method: 'patch',
    path: '/shop',
    summary: 'Change the shop’s settings',
    permission: 'shop.edit',
    body: shopPatchSchema,
    response: shopSchema,
  }),
  listUsers: endpoint({
    method: 'get',
    path: '/users',
    summary: 'All users of the shop',
    permission: 'users.manage',
    response: z.array(userSchema),
  }),
  createUser: endpoint({
    method: 'post',
    path: '/users',
    summary: 'Add a user; answers a temporary password',
    permission: 'users.manage',
    body: userCreateSchema,
    response: userCreatedSchema,
  }),
  updateUser: endpoint({
    method: 'patch',
    path: '/users/:userId',
    summary: 'Change role, name, employee, active',
    permission: 'users.manage',
    params: z.object({ userId: idSchema }),
    body: userPatchSchema,
    response: userSchema,
  }),
  resetUserPassword: endpoint({
    method: 'post',
    path: '/users/:userId/password',
    summary: 'Give a user a new temporary password',
    permission: 'users.manage',
    params: z.object({ userId: idSchema }),
    response: userCreatedSchema,
  }),
};
