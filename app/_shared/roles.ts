export const ROLES = ['owner', 'designer', 'reviewer', 'viewer'] as const;
export type Role = (typeof ROLES)[number];
