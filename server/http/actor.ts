import type { Role } from '#shared/roles.ts';

/** Who asks: an account, reached through a session of the browser or a personal token. */
export interface Actor {
  id: string;
  name: string;
  email: string;
  role: Role;
  demo: boolean;
  createdAt: Date;
  credential:
    { kind: 'session'; sessionId: string } | { kind: 'token'; tokenId: string; mayWrite: boolean };
}
