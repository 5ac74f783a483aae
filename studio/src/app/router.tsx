import { createBrowserRouter, Navigate, type RouteObject } from 'react-router-dom';
import { ErrorPage } from './error-page.tsx';
import { Layout } from './layout.tsx';
import { NotFoundPage } from './not-found-page.tsx';
import { SignedIn } from './signed-in.tsx';

const guestPages: RouteObject[] = [
  {
    path: '/',
    lazy: async () => ({ Component: (await import('../features/landing/landing-page.tsx')).LandingPage }),
  },
  {
    path: '/try',
    lazy: async () => ({
      Component: (await import('../features/session-desk/session-desk-page.tsx')).SessionDeskPage,
    }),
  },
  {
    path: '/model',
    lazy: async () => ({ Component: (await import('../features/model/model-page.tsx')).ModelPage }),
  },
  {
    path: '/schema',
    lazy: async () => ({ Component: (await import('../features/schema/schema-page.tsx')).SchemaPage }),
  },
  {
    path: '/sign-in',
    lazy: async () => ({ Component: (await import('../features/sign-in/sign-in-page.tsx')).SignInPage }),
  },
  {
    path: '/sign-up',
    lazy: async () => ({ Component: (await import('../features/sign-in/sign-up-page.tsx')).SignUpPage }),
  },
  {
    path: '/forgot-password',
    lazy: async () => ({
      Component: (await import('../features/sign-in/forgot-password-page.tsx')).ForgotPasswordPage,
    }),
  },
  {
    path: '/reset-password',
    lazy: async () => ({ Component: (await import('../features/sign-in/reset-password-page.tsx')).ResetPasswordPage }),
  },
  {
    path: '/confirm-email',
    lazy: async () => ({ Component: (await import('../features/sign-in/confirm-email-page.tsx')).ConfirmEmailPage }),
  },
  {
    path: '/join',
    lazy: async () => ({ Component: (await import('../features/sign-in/join-page.tsx')).JoinPage }),
  },
];

/** Below `/w/:workspaceId`. */
const workspacePages: RouteObject[] = [
  { index: true, element: <Navigate to="studies" replace /> },
  {
    path: 'team',
    lazy: async () => ({ Component: (await import('../features/team/team-page.tsx')).TeamPage }),
  },
  {
    path: 'settings',
    lazy: async () => ({ Component: (await import('../features/team/settings-page.tsx')).SettingsPage }),
  },
  {
    path: 'activity',
    lazy: async () => ({ Component: (await import('../features/activity/activity-page.tsx')).ActivityPage }),
  },
  {
    path: 'library',
    lazy: async () => ({ Component: (await import('../features/library/library-page.tsx')).LibraryPage }),
  },
  {
    path: 'library/:itemId',
    lazy: async () => ({ Component: (await import('./library-item-route.tsx')).LibraryItemRoute }),
  },
  {
    path: 'studies/:studyId',
    lazy: async () => ({
      Component: (await import('../features/session-desk/study-desk-page.tsx')).StudyDeskPage,
    }),
  },
  {
    path: 'studies',
    lazy: async () => ({ Component: (await import('../features/studies/studies-page.tsx')).StudiesPage }),
  },
  {
    path: 'studies/new',
    lazy: async () => ({ Component: (await import('../features/studies/new-study-page.tsx')).NewStudyPage }),
  },
];

const signedInPages: RouteObject[] = [
  {
    path: '/account',
    lazy: async () => ({ Component: (await import('../features/account/account-page.tsx')).AccountPage }),
  },
  {
    path: '/new-workspace',
    lazy: async () => ({ Component: (await import('../features/team/new-workspace-page.tsx')).NewWorkspacePage }),
  },
  {
    path: '/w/:workspaceId',
    lazy: async () => ({ Component: (await import('./workspace-frame.tsx')).WorkspaceFrame }),
    children: [...workspacePages, { path: '*', element: <NotFoundPage /> }],
  },
];

/** Every page is a bundle of its own: the landing page never waits for the desk, nor either for Plotly. */
export const router = createBrowserRouter([
  {
    element: <Layout />,
    errorElement: <ErrorPage />,
    // The sheet stays empty for the moment before the first page's bundle is here.
    HydrateFallback: () => null,
    children: [
      {
        errorElement: <ErrorPage />,
        children: [
          ...guestPages,
          { element: <SignedIn />, children: signedInPages },
          { path: '*', element: <NotFoundPage /> },
        ],
      },
    ],
  },
]);
