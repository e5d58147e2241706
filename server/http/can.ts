import { PERMISSIONS } from '#shared/roles.ts';
import type { Action } from '#shared/roles.ts';
import type { Actor } from './actor.ts';

/** What ownership is judged by: the owner, and the members of the campaign if there is one. */
export interface Resource {
  ownerId: string;
  memberIds?: readonly string[];
}

/** May this actor do this to that? The only place that knows what ownership means. */
export function can(
  actor: Pick<Actor, 'id' | 'role'>,
  action: Action,
  resource?: Resource,
): boolean {
  const reach = PERMISSIONS[actor.role][action];
  switch (reach) {
    case 'any':
      return true;
    case 'involved':
      return (
        resource !== undefined &&
        (resource.ownerId === actor.id || (resource.memberIds ?? []).includes(actor.id))
      );
    case 'own':
      return resource !== undefined && resource.ownerId === actor.id;
    case 'none':
      return false;
  }
}

/** True where some role's permission depends on whose the resource is. */
export function dependsOnOwner(action: Action): boolean {
  return Object.values(PERMISSIONS).some((row) => ['own', 'involved'].includes(row[action]));
}
