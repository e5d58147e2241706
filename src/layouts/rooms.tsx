import {
  BookOpenText,
  CircleUserRound,
  LampDesk,
  LibraryBig,
  Ruler,
  SlidersHorizontal,
  UsersRound,
} from 'lucide-react';
import { NavLink } from 'react-router-dom';
import type { Session } from '#shared/contracts/auth.ts';
import { classNames } from '#src/lib/class-names.ts';
import { mayEver } from '#src/lib/session.ts';
import { Brand } from './brand.tsx';

interface Room {
  to: string;
  label: string;
  Icon: typeof LampDesk;
  end?: boolean;
}

const DESK: Room = { to: '/', label: 'Desk', Icon: LampDesk, end: true };
const CASES: Room = { to: '/cases', label: 'Cases', Icon: BookOpenText };
const LIBRARY: Room = { to: '/library', label: 'Library', Icon: LibraryBig };
const REFERENCE: Room = { to: '/reference', label: 'Reference', Icon: Ruler };
const PEOPLE: Room = { to: '/people', label: 'People', Icon: UsersRound };
const SETTINGS: Room = { to: '/admin/settings', label: 'Settings', Icon: SlidersHorizontal };
const ACCOUNT: Room = { to: '/account', label: 'Account', Icon: CircleUserRound };

function RoomLink({ room, onWalk }: { room: Room; onWalk: (() => void) | undefined }) {
  const { to, label, Icon, end = false } = room;
  return (
    <li>
      <NavLink
        to={to}
        end={end}
        onClick={onWalk}
        className={({ isActive }) =>
          classNames(
            'flex min-h-9 items-center gap-2.5 rounded px-2.5 py-1.5',
            isActive ? 'bg-barn-soft font-semibold text-barn' : 'text-ink hover:bg-soft',
          )
        }
      >
        <Icon aria-hidden="true" className="size-4.5" strokeWidth={1.75} />
        {label}
      </NavLink>
    </li>
  );
}

/** The rooms this person can enter; one that is not built, or not theirs, is not in the menu. */
export function Rooms({
  session,
  brand = false,
  onWalk,
}: {
  session: Session;
  /** Head the rooms with the mark. */
  brand?: boolean;
  onWalk?: () => void;
}) {
  const open = [LIBRARY, REFERENCE];
  const research = mayEver(session, 'case.list') ? [DESK, CASES, ...open] : open;
  const admin = [
    ...(mayEver(session, 'user.list') ? [PEOPLE] : []),
    ...(mayEver(session, 'settings.write') ? [SETTINGS] : []),
  ];
  return (
    <nav aria-label="Rooms" className="flex flex-1 flex-col gap-4">
      {brand && (
        <div className="px-1.5 pb-2">
          <Brand />
        </div>
      )}
      <ul className="flex flex-col gap-0.5">
        {research.map((room) => (
          <RoomLink key={room.to} room={room} onWalk={onWalk} />
        ))}
      </ul>
      {admin.length > 0 && (
        <div>
          <h2 className="mb-1 px-2.5 text-xs font-semibold text-muted">Admin</h2>
          <ul className="flex flex-col gap-0.5">
            {admin.map((room) => (
              <RoomLink key={room.to} room={room} onWalk={onWalk} />
            ))}
          </ul>
        </div>
      )}
      <ul className="mt-auto border-t border-line pt-3">
        <RoomLink room={ACCOUNT} onWalk={onWalk} />
      </ul>
    </nav>
  );
}
