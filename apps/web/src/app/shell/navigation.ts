import { hasPermission, type Permission, type Role } from '@brakeven/contract';

export interface NavigationPage {
  path: string;
  label: string;
  permission: Permission;
}

export interface NavigationGroup {
  label: string;
  /** For those who see none of it in money. */
  labelWithoutMoney?: string;
  pages: readonly NavigationPage[];
}

/** The rail: what the shop comes for, in four groups. */
export const NAVIGATION: readonly NavigationGroup[] = [
  {
    label: 'Money',
    labelWithoutMoney: 'Work',
    pages: [
      { path: '/payback', label: 'Payback', permission: 'payback.view' },
      { path: '/jobs', label: 'Jobs', permission: 'jobs.view' },
      { path: '/customers', label: 'Customers', permission: 'jobs.money' },
      { path: '/hours', label: 'Hours', permission: 'hours.own' },
    ],
  },
  {
    label: 'Shop',
    pages: [
      { path: '/forming', label: 'Forming', permission: 'forming.use' },
      { path: '/machines', label: 'Machines', permission: 'machines.view' },
    ],
  },
  {
    label: 'Books',
    pages: [
      { path: '/timesheets', label: 'Timesheets', permission: 'timesheets.use' },
      { path: '/month-end', label: 'Month end', permission: 'months.view' },
    ],
  },
  {
    label: 'Shop setup',
    pages: [
      { path: '/people', label: 'People & rates', permission: 'people.view' },
      { path: '/materials', label: 'Materials', permission: 'materials.view' },
      { path: '/shop', label: 'Shop', permission: 'shop.edit' },
    ],
  },
];

const HOME: Readonly<Record<Role, string>> = {
  owner: '/payback',
  bookkeeper: '/timesheets',
  lead: '/jobs',
  operator: '/hours',
};

/** The groups with the pages that a role may open; groups left empty go. */
export function listNavigation(role: Role): NavigationGroup[] {
  return NAVIGATION.map((group) => ({
    ...group,
    label: (hasPermission(role, 'jobs.money') ? null : group.labelWithoutMoney) ?? group.label,
    pages: group.pages.filter((page) => hasPermission(role, page.permission)),
  })).filter((group) => group.pages.length > 0);
}

/** The page that a role comes for. */
export function findHomePath(role: Role): string {
  return HOME[role];
}
