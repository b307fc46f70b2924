import { createBrowserRouter, Navigate, type RouteObject } from 'react-router-dom';
import { Skeleton } from '../ui/skeleton.tsx';
import { NotFound } from './not-found.tsx';
import { FIRM_PARTS, PATTERNS } from './paths.ts';
import { RootLayout } from './root-layout.tsx';
import { RouteError } from './route-error.tsx';
import { FirmFrame } from './shell/firm-frame.tsx';

const outside: RouteObject[] = [
  { index: true, lazy: () => import('../routes/front.tsx') },
  { path: PATTERNS.about, lazy: () => import('../routes/about.tsx') },
  { path: PATTERNS.signUp, lazy: () => import('../routes/sign-up.tsx') },
  { path: PATTERNS.signIn, lazy: () => import('../routes/sign-in.tsx') },
  { path: PATTERNS.forgot, lazy: () => import('../routes/forgotten.tsx') },
  { path: PATTERNS.reset, lazy: () => import('../routes/reset.tsx') },
  { path: PATTERNS.invitation, lazy: () => import('../routes/invitation.tsx') },
  { path: PATTERNS.account, lazy: () => import('../routes/account.tsx') },
  { path: PATTERNS.mailbox, lazy: () => import('../routes/mailbox.tsx') },
  { path: PATTERNS.inspect, lazy: () => import('../routes/inspect.tsx') },
  { path: PATTERNS.inspection, lazy: () => import('../routes/inspection.tsx') },
];

const ofJob: RouteObject[] = [
  { index: true, element: <Navigate to={PATTERNS.schedule} replace /> },
  { path: PATTERNS.schedule, lazy: () => import('../routes/schedule.tsx') },
  { path: PATTERNS.sizes, lazy: () => import('../routes/sizes.tsx') },
  { path: PATTERNS.equations, lazy: () => import('../routes/equations.tsx') },
  { path: PATTERNS.reports, lazy: () => import('../routes/reports.tsx') },
  { path: PATTERNS.settings, lazy: () => import('../routes/job-settings.tsx') },
];

const ofFirm: RouteObject[] = [
  { index: true, element: <Navigate to={PATTERNS.jobs} replace /> },
  { path: PATTERNS.jobs, lazy: () => import('../routes/jobs.tsx') },
  { path: PATTERNS.newJob, lazy: () => import('../routes/new-job.tsx') },
  { path: PATTERNS.uploadJob, lazy: () => import('../routes/upload-job.tsx') },
  { path: 'firm', element: <Navigate to={FIRM_PARTS[0]} replace /> },
  { path: PATTERNS.firmPart, lazy: () => import('../routes/firm.tsx') },
  { path: PATTERNS.job, lazy: () => import('../routes/job.tsx'), children: ofJob },
];

/** Every place is fetched when it is first opened. */
export const router = createBrowserRouter([
  {
    element: <RootLayout />,
    errorElement: <RouteError />,
    hydrateFallbackElement: <Skeleton rows={10} label="Opening Farlug" />,
    children: [
      ...outside.map((route) => ({ ...route, errorElement: <RouteError /> })),
      {
        path: PATTERNS.firm,
        element: <FirmFrame />,
        children: ofFirm.map((route) => ({ ...route, errorElement: <RouteError framed /> })),
      },
      { path: '*', element: <NotFound /> },
    ],
  },
]);
