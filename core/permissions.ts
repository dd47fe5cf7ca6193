/**
 * Who may do what: the one table, used by the server to decide and by the client to show only what will work.
 */
export const ROLES = ['researcher', 'outreach', 'curator', 'approver', 'steward'] as const
export type Role = (typeof ROLES)[number]

/** What a signed-in person may do beyond a visitor. Ownership and state are checked where the action is carried out. */
export const PERMISSIONS = {
  /** Read the newest release: atlas, catalogue, downloads. */
  'catalogue.read': ['visitor', ...ROLES],
  /** Read the current revision and any past one, released or not. */
  'catalogue.read-current': ROLES,
  'submission.read': ['curator', 'approver', 'steward'],
  'submission.write': ['curator', 'approver', 'steward'],
  /** Approve, return and reject; never one's own. */
  'submission.review': ['approver', 'steward'],
  'import.write': ['curator', 'approver', 'steward'],
  'source.write': ['curator', 'approver', 'steward'],
  /** Draw and download a figure. */
  'figure.render': ['visitor', ...ROLES],
  /** Keep a figure in the gallery. */
  'figure.write': ROLES,
  'release.publish': ['steward'],
  'audit.read': ['steward'],
  /** Sign in, sign out, see oneself. */
  'session.use': ['visitor', ...ROLES],
} as const satisfies Record<string, readonly (Role | 'visitor')[]>

export type Permission = keyof typeof PERMISSIONS

/** The permissions of somebody with these roles; an empty list is a visitor. */
export function permissionsOf(roles: readonly Role[]): Permission[] {
  const held: readonly string[] = roles.length === 0 ? ['visitor'] : roles
  return (Object.keys(PERMISSIONS) as Permission[]).filter((p) => {
    const allowed: readonly string[] = PERMISSIONS[p]
    return allowed.some((r) => held.includes(r) || r === 'visitor')
  })
}

/** Whether somebody with these permissions may do this. */
export function can(permissions: readonly string[], permission: Permission): boolean {
  return permissions.includes(permission)
}
