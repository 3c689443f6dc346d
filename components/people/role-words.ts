import type { ProjectRole } from '@/lib/api/permissions';

/** Roles as the pages name them. */
export const roleWords: Record<ProjectRole, string> = { designer: 'Designer', technician: 'Technician', owner: 'Owner' };
