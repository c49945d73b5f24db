/** What somebody signed in may be; one role each. */
export const ROLES = ['owner', 'bookkeeper', 'lead', 'operator'] as const;
export type Role = (typeof ROLES)[number];

/**
 * Who may do what, in the one place that the server checks and the web app hides by.
 * Wages belong to `people.view`, money on jobs to `jobs.money`: what somebody may not see is never sent.
 */
export const PERMISSIONS = {
  'session.own': ['owner', 'bookkeeper', 'lead', 'operator'],
  'shop.view': ['owner', 'bookkeeper', 'lead', 'operator'],
  'shop.edit': ['owner'],
  'users.manage': ['owner'],
  'audit.view': ['owner'],
  'setup.import': ['owner'],
  'payback.view': ['owner'],
  'jobs.view': ['owner', 'bookkeeper', 'lead'],
  'jobs.money': ['owner', 'bookkeeper'],
  'jobs.edit': ['owner', 'bookkeeper'],
  'hours.own': ['owner', 'bookkeeper', 'lead', 'operator'],
  'hours.all': ['owner', 'bookkeeper', 'lead'],
  'hours.edit': ['owner', 'bookkeeper'],
  'timesheets.use': ['owner', 'bookkeeper'],
  'machines.view': ['owner', 'lead'],
  'machines.money': ['owner'],
  'machines.edit': ['owner'],
  'materials.view': ['owner', 'bookkeeper', 'lead'],
  'materials.money': ['owner', 'bookkeeper'],
  'materials.edit': ['owner', 'bookkeeper'],
  // Machines by name and rating, tools, materials and trial bends, for whoever sets a press up; no money.
  'forming.use': ['owner', 'lead', 'operator'],
  'tooling.edit': ['owner', 'lead'],
  'press-runs.log': ['owner', 'lead', 'operator'],
  'press-runs.view': ['owner', 'lead'],
  'months.view': ['owner', 'bookkeeper'],
  'months.close': ['owner', 'bookkeeper'],
  'months.reopen': ['owner'],
  'people.view': ['owner', 'bookkeeper'],
  'people.edit': ['owner', 'bookkeeper'],
  'rollup.view': ['owner', 'bookkeeper', 'lead'],
  'rollup.run': ['owner', 'bookkeeper'],
} as const satisfies Record<string, readonly Role[]>;

export type Permission = keyof typeof PERMISSIONS;

/** Whether a role has a permission. */
export function hasPermission(role: Role, permission: Permission): boolean {
  return (PERMISSIONS[permission] as readonly Role[]).includes(role);
}
