import { Suspense, useMemo, useState } from 'react';
import { Keyboard } from 'lucide-react';
import { Link, Outlet, useLocation, useNavigate } from 'react-router-dom';
import type { Session } from '#shared/contracts/auth.ts';
import { ROLE_LABELS } from '#shared/roles.ts';
import { IconButton } from '#src/components/button.tsx';
import { Skeleton, Waiting } from '#src/components/skeleton.tsx';
import { ThemeSwitch } from '#src/components/theme-switch.tsx';
import { classNames } from '#src/lib/class-names.ts';
import { HeaderSearch } from '#src/features/search/components/header-search.tsx';
import { mayEver } from '#src/lib/session.ts';
import { useShortcuts } from '#src/lib/shortcuts.ts';
import { Brand } from './brand.tsx';
import { NarrowMenu } from './narrow-menu.tsx';
import { Rooms } from './rooms.tsx';
import { SessionLost } from './session-lost.tsx';
import { ShortcutsDialog } from './shortcuts-dialog.tsx';
import { SignOut } from './sign-out.tsx';

function useKeys(session: Session, showKeys: () => void) {
  const navigate = useNavigate();
  const { pathname } = useLocation();
  const research = mayEver(session, 'case.create');
  useShortcuts(
    useMemo(() => {
      const always = { '?': showKeys };
      if (!research) return always;
      const begin = () => pathname !== '/cases/new' && void navigate('/cases/new');
      return { ...always, n: begin };
    }, [research, navigate, pathname, showKeys]),
  );
}

function DemoBanner() {
  return (
    <aside
      aria-label="Demo"
      data-screen-only
      className="border-b border-line bg-straw-soft px-4 py-1 text-center text-sm text-ink"
    >
      <strong className="font-semibold">Demo:</strong> an invented facility; its cases and numbers
      belong to no real measurement.
    </aside>
  );
}

function PageWaiting() {
  return (
    <Waiting what="the page">
      <Skeleton className="mb-4 h-8 w-72 max-w-full" />
      <Skeleton className="mb-2 w-full" />
      <Skeleton className="mb-2 w-5/6" />
      <Skeleton className="w-2/3" />
    </Waiting>
  );
}

/** What stands around every page of a person who is signed in. */
export function Shell({ session }: { session: Session }) {
  const { user, demo } = session;
  const [keysShown, setKeysShown] = useState(false);
  const showKeys = useMemo(() => () => setKeysShown(true), []);
  useKeys(session, showKeys);
  const lab = demo ? 'Lowmoor Beam Hall' : window.location.host;
  const who = (
    <Link to="/account" className="rounded hover:text-ink" title={user.name}>
      {ROLE_LABELS[user.role]}
    </Link>
  );
  const keys = (
    <IconButton label="Keys" onClick={showKeys} className="max-lg:hidden">
      <Keyboard aria-hidden="true" className="size-4.5" strokeWidth={1.75} />
    </IconButton>
  );
  return (
    <div
      className={classNames(
        'flex min-h-svh flex-col',
        // The height of the banner, so that the foot of the rooms stays in sight below it.
        demo ? '[--banner:1.8125rem]' : '[--banner:0px]',
      )}
    >
      <a
        href="#main"
        className="absolute top-2 left-2 z-60 -translate-y-16 rounded bg-ink px-3 py-2 text-paper focus:translate-y-0"
      >
        Skip to the page
      </a>
      {demo && <DemoBanner />}
      <div className="flex flex-1">
        <div data-screen-only className="hidden w-49 shrink-0 border-r border-line lg:block">
          <div className="sticky top-0 flex h-[calc(100svh-var(--banner))] flex-col overflow-y-auto px-3 py-4">
            <Rooms session={session} brand />
          </div>
        </div>
        <div className="flex min-w-0 flex-1 flex-col">
          <header
            data-screen-only
            className="flex min-h-13 items-center justify-between gap-3 border-line px-4 text-sm text-muted max-lg:border-b lg:px-8 lg:pt-2"
          >
            <div className="lg:hidden">
              <Brand />
            </div>
            <span className="truncate max-lg:hidden">{lab}</span>
            <div className="flex min-w-0 flex-1 justify-center max-lg:justify-end">
              <HeaderSearch />
            </div>
            <div className="flex items-center gap-3 max-lg:hidden">
              {who}
              {keys}
              <ThemeSwitch iconsOnly />
              <SignOut accountId={user.id} />
            </div>
            <NarrowMenu session={session}>
              <span className="text-sm text-muted">
                {lab} · {ROLE_LABELS[user.role]}
              </span>
              <ThemeSwitch />
              <SignOut accountId={user.id} />
            </NarrowMenu>
          </header>
          <SessionLost user={user} />
          <main
            id="main"
            tabIndex={-1}
            className="w-full max-w-[84rem] min-w-0 flex-1 px-4 pt-4 pb-12 lg:px-8 lg:pt-2"
          >
            <Suspense fallback={<PageWaiting />}>
              <Outlet />
            </Suspense>
          </main>
        </div>
      </div>
      <ShortcutsDialog
        open={keysShown}
        onOpenChange={setKeysShown}
        research={mayEver(session, 'case.create')}
      />
    </div>
  );
}
