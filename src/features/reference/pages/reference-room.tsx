import { NavLink, Outlet } from 'react-router-dom';
import { classNames } from '#src/lib/class-names.ts';

const PLACES = [
  { to: '/reference', label: 'Overview', end: true },
  { to: '/reference/forms', label: 'Forms' },
  { to: '/reference/species', label: 'Particles' },
  { to: '/reference/nuclides', label: 'Nuclides' },
  { to: '/reference/elements', label: 'Elements' },
  { to: '/reference/neutron-lengths', label: 'Neutron lengths' },
  { to: '/reference/materials', label: 'Materials' },
] as const;

/** What stands above every page of the Reference: the way to its neighbours. */
export default function ReferenceRoom() {
  return (
    <div className="flex flex-col gap-4">
      <nav aria-label="Reference" data-screen-only className="border-b border-line">
        <ul className="-mb-px flex flex-wrap gap-x-5">
          {PLACES.map(({ to, label, ...rest }) => (
            <li key={to}>
              <NavLink
                to={to}
                end={'end' in rest}
                className={({ isActive }) =>
                  classNames(
                    'block rounded-none border-b-2 py-1.5',
                    isActive
                      ? 'border-barn font-semibold text-barn'
                      : 'border-transparent text-muted hover:border-edge hover:text-ink',
                  )
                }
              >
                {label}
              </NavLink>
            </li>
          ))}
        </ul>
      </nav>
      <Outlet />
    </div>
  );
}
