import { CircleCheck, CircleOff } from 'lucide-react';
import type { User } from '#shared/contracts/users.ts';
import { ROLE_LABELS } from '#shared/roles.ts';
import { Button } from '#src/components/button.tsx';
import { Chip } from '#src/components/chip.tsx';
import { classNames } from '#src/lib/class-names.ts';
import { dayOf } from '#src/lib/dates.ts';

const CELL = 'px-3 py-2.5 align-top';

function Activity({ active }: { active: boolean }) {
  const Icon = active ? CircleCheck : CircleOff;
  return (
    <Chip tone={active ? 'sound' : 'plain'} icon={<Icon aria-hidden="true" className="size-3.5" />}>
      {active ? 'Active' : 'Deactivated'}
    </Chip>
  );
}

interface PeopleTableProps {
  people: readonly User[];
  /** Whose own account it is: nobody locks themselves out by a slip. */
  selfId: string;
  onEdit: (user: User) => void;
  onActivity: (user: User) => void;
}

function Row({ user, selfId, onEdit, onActivity }: PeopleTableProps & { user: User }) {
  return (
    <tr className="border-t border-line">
      <td className={CELL}>
        <span className="font-semibold">{user.name}</span>
        {user.demo && <span className="ml-2 text-sm text-muted">demo account</span>}
        {user.id === selfId && <span className="ml-2 text-sm text-muted">you</span>}
        <span className="block text-sm break-all text-muted">{user.email}</span>
        <span className="flex flex-wrap items-center gap-2 pt-1 text-sm md:hidden">
          {ROLE_LABELS[user.role]} <Activity active={user.active} />
        </span>
      </td>
      <td className={classNames(CELL, 'max-md:hidden')}>{ROLE_LABELS[user.role]}</td>
      <td className={classNames(CELL, 'max-md:hidden')}>
        <Activity active={user.active} />
      </td>
      <td className={classNames(CELL, 'whitespace-nowrap text-muted max-lg:hidden')}>
        {dayOf(user.createdAt)}
      </td>
      <td className={CELL}>
        <div className="flex justify-end gap-2 max-sm:flex-col">
          <Button size="small" onClick={() => onEdit(user)} aria-label={`Change ${user.name}`}>
            Change
          </Button>
          {user.id !== selfId && (
            <Button
              size="small"
              onClick={() => onActivity(user)}
              aria-label={`${user.active ? 'Deactivate' : 'Activate'} ${user.name}`}
            >
              {user.active ? 'Deactivate' : 'Activate'}
            </Button>
          )}
        </div>
      </td>
    </tr>
  );
}

export function PeopleTable(props: PeopleTableProps) {
  return (
    <div className="rounded border border-line bg-sheet">
      <table className="w-full border-collapse text-left">
        <caption className="sr-only">Accounts by name</caption>
        <thead className="text-sm text-muted">
          <tr>
            <th scope="col" className="px-3 py-2 font-semibold">
              Person
            </th>
            <th scope="col" className="px-3 py-2 font-semibold max-md:hidden">
              Role
            </th>
            <th scope="col" className="px-3 py-2 font-semibold max-md:hidden">
              State
            </th>
            <th scope="col" className="px-3 py-2 font-semibold max-lg:hidden">
              Since
            </th>
            <th scope="col" className="px-3 py-2">
              <span className="sr-only">What can be done</span>
            </th>
          </tr>
        </thead>
        <tbody>
          {props.people.map((user) => (
            <Row key={user.id} user={user} {...props} />
          ))}
        </tbody>
      </table>
    </div>
  );
}
