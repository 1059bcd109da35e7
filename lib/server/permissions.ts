/**
 * The one table of who may do what. Guard, pages, live feed and the authorisation tests all read it; a role is named
 * nowhere else.
 */
export const ROLES = ['owner', 'grower', 'installer'] as const;
export type Role = (typeof ROLES)[number];
/** Of whom a holding always keeps one. */
export const OWNER: Role = 'owner';

const everyone = ['owner', 'grower', 'installer'] as const;

export const PERMISSIONS = {
  'holding.see': everyone,
  'rule.write': ['owner', 'grower'],
  'rule.force': ['owner', 'grower'],
  'channel.hand': ['owner', 'grower'],
  'channel.prove': ['owner', 'installer'],
  'heap.write': ['owner', 'grower'],
  'report.write': ['owner', 'grower'],
  'money.write': ['owner'],
  'import.write': ['owner', 'grower'],
  'alarm.answer': everyone,
  'wiring.write': ['owner', 'installer'],
  'node.token': ['owner', 'installer'],
  'lockout.place': everyone,
  'lockout.remove': ['owner', 'installer'],
  'yard.write': ['owner', 'installer'],
  'house.delete': ['owner'],
  'people.manage': ['owner'],
  'key.manage': ['owner'],
  'audit.see': ['owner'],
  'holding.manage': ['owner'],
  'holding.archive': ['owner'],
} as const satisfies Record<string, readonly Role[]>;

export type Action = keyof typeof PERMISSIONS;

export function isRole(value: unknown): value is Role {
  return typeof value === 'string' && (ROLES as readonly string[]).includes(value);
}

export function may(role: Role, action: Action): boolean {
  return (PERMISSIONS[action] as readonly Role[]).includes(role);
}

/** All a role may do, as data for components, which must not import this module. */
export function allowedTo(role: Role): Action[] {
  return (Object.keys(PERMISSIONS) as Action[]).filter((action) => may(role, action));
}
