import { Outlet } from 'react-router-dom';
import { RouteFocus } from './route-focus.tsx';

export function RootLayout() {
  return (
    <>
      <a
        href="#main"
        className="fixed top-0 left-0 z-60 -translate-y-full bg-copper px-4 py-3 text-on-copper focus:translate-y-0"
      >
        Skip to the page
      </a>
      <Outlet />
      <RouteFocus />
    </>
  );
}
