import type { Migration } from '@mikro-orm/migrations';
import type { Constructor } from '@mikro-orm/core';
import { GroundFloor } from './migrations/m001-ground-floor.ts';
import { Cases } from './migrations/m002-cases.ts';
import { LibraryAndSettings } from './migrations/m003-library-and-settings.ts';
import { Jobs } from './migrations/m004-jobs.ts';

/** Every migration in its order; a name once released never changes. */
export const MIGRATIONS: { name: string; class: Constructor<Migration> }[] = [
  { name: 'm001-ground-floor', class: GroundFloor },
  { name: 'm002-cases', class: Cases },
  { name: 'm003-library-and-settings', class: LibraryAndSettings },
  { name: 'm004-jobs', class: Jobs },
];
