/**
 * Who may do what: the table of product.md, in one place. The server decides with it (`lib/server/auth`); pages use
 * the same table only to leave out what would be refused.
 */
export const roles = ['administrator', 'designer', 'technician', 'owner'] as const;
export type Role = (typeof roles)[number];

/** Roles that a person can hold on a project; an administrator is one on all projects of the organisation. */
export const projectRoles = ['designer', 'technician', 'owner'] as const;
export type ProjectRole = (typeof projectRoles)[number];

export const permissions = {
  'people.manage': ['administrator'],
  'people.see': ['administrator', 'designer'],
  'project.create': ['administrator', 'designer'],
  'project.manage': ['administrator'],
  'project.see': ['administrator', 'designer', 'technician', 'owner'],
  'loop.create': ['designer'],
  'drawing.edit': ['designer'],
  'drawing.solve': ['designer'],
  'draft.see': ['administrator', 'designer'],
  'revision.issue': ['designer'],
  'loop.see': ['administrator', 'designer', 'technician', 'owner'],
  'readings.record': ['technician'],
  'snag.raise': ['technician', 'owner'],
  'snag.resolve': ['technician'],
  'instruments.see': ['administrator', 'designer', 'technician', 'owner'],
  'instruments.manage': ['administrator', 'technician'],
  'catalogue.manage': ['administrator', 'designer'],
  'report.submit': ['technician'],
  'report.review': ['designer'],
  'report.accept': ['owner'],
  'report.download': ['administrator', 'designer', 'technician', 'owner'],
  'activity.see': ['administrator', 'designer', 'technician', 'owner'],
  'account.own': ['administrator', 'designer', 'technician', 'owner'],
} as const satisfies Record<string, readonly Role[]>;

export type Permission = keyof typeof permissions;

/** Whether any of the roles carries the permission. */
export const may = (held: readonly Role[], permission: Permission): boolean =>
  (permissions[permission] as readonly Role[]).some((role) => held.includes(role));
