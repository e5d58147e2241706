import { createBrowserRouter, Outlet, type RouteObject } from 'react-router-dom';
import { Toaster } from '#src/components/toaster.tsx';
import { Skeleton, Waiting } from '#src/components/skeleton.tsx';
import { NotFound } from '#src/components/not-found.tsx';
import { PageTrouble } from '#src/layouts/page-trouble.tsx';
import { SignedIn } from '#src/layouts/signed-in.tsx';

/** A page of its own file, fetched when it is first visited. */
function page(
  load: () => Promise<{ default: React.ComponentType }>,
): NonNullable<RouteObject['lazy']> {
  return async () => ({ Component: (await load()).default });
}

function Everything() {
  return (
    <>
      <Outlet />
      <Toaster />
    </>
  );
}

function FirstPaint() {
  return (
    <Waiting what="Tallybarn">
      <Skeleton className="m-8 h-8 w-48" />
    </Waiting>
  );
}

const casePage = page(() => import('#src/features/case/pages/case-page.tsx'));

const interactionPage = page(() => import('#src/features/library/pages/interaction-page.tsx'));

const rooms: RouteObject[] = [
  { index: true, lazy: page(() => import('#src/features/desk/pages/desk-page.tsx')) },
  { path: 'cases', lazy: page(() => import('#src/features/case-list/pages/cases-page.tsx')) },
  { path: 'cases/new', lazy: casePage },
  { path: 'cases/:caseId', lazy: casePage },
  { path: 'cases/:caseId/versions/:n', lazy: casePage },
  {
    path: 'reference',
    lazy: page(() => import('#src/features/reference/pages/reference-room.tsx')),
    children: [
      { index: true, lazy: page(() => import('#src/features/reference/pages/overview-page.tsx')) },
      { path: 'forms', lazy: page(() => import('#src/features/reference/pages/forms-page.tsx')) },
      {
        path: 'forms/:key',
        lazy: page(() => import('#src/features/reference/pages/form-page.tsx')),
      },
      {
        path: 'species',
        lazy: page(() => import('#src/features/reference/pages/species-page.tsx')),
      },
      {
        path: 'nuclides',
        lazy: page(() => import('#src/features/reference/pages/nuclides-page.tsx')),
      },
      {
        path: 'nuclides/:nuclide',
        lazy: page(() => import('#src/features/reference/pages/nuclide-page.tsx')),
      },
      {
        path: 'elements',
        lazy: page(() => import('#src/features/reference/pages/elements-page.tsx')),
      },
      {
        path: 'neutron-lengths',
        lazy: page(() => import('#src/features/reference/pages/neutron-lengths-page.tsx')),
      },
      {
        path: 'materials',
        lazy: page(() => import('#src/features/reference/pages/materials-page.tsx')),
      },
    ],
  },
  { path: 'library', lazy: page(() => import('#src/features/library/pages/library-page.tsx')) },
  { path: 'library/interactions/:id', lazy: interactionPage },
  { path: 'library/interactions/:id/versions/:n', lazy: interactionPage },
  { path: 'account', lazy: page(() => import('#src/features/account/pages/account-page.tsx')) },
  { path: 'people', lazy: page(() => import('#src/features/users/pages/people-page.tsx')) },
  {
    path: 'admin/settings',
    lazy: page(() => import('#src/features/admin/pages/settings-page.tsx')),
  },
  { path: '*', Component: NotFound },
];

export const router = createBrowserRouter([
  {
    Component: Everything,
    HydrateFallback: FirstPaint,
    ErrorBoundary: PageTrouble,
    children: [
      {
        path: 'sign-in',
        lazy: page(() => import('#src/features/auth/pages/sign-in-page.tsx')),
      },
      {
        path: '/',
        Component: SignedIn,
        // The shell stays when a page inside it breaks.
        children: [{ ErrorBoundary: PageTrouble, children: rooms }],
      },
    ],
  },
]);
