import { AppError, forbidden } from '#server/errors';

export type Role = 'visitor' | 'member' | 'coach' | 'owner';

/** The signed-in person, as read with the session by one query. */
export interface Viewer {
  id: string;
  name: string | null;
  email: string;
  role: Role;
  timeZone: string;
  units: 'metric' | 'imperial';
  sessionId: string;
}

/** @throws AppError signed-out when nobody is signed in */
export function requireViewer(viewer: Viewer | null): Viewer {
  if (!viewer) throw new AppError('signed-out', 'Sign in first; you come back here afterwards.');
  return viewer;
}

/** @throws AppError signed-out or forbidden */
export function requireRole(viewer: Viewer | null, ...roles: Role[]): Viewer {
  const person = requireViewer(viewer);
  if (!roles.includes(person.role)) throw forbidden();
  return person;
}
