import { useEffect, useRef, useState } from 'react';
import { useLocation } from 'react-router-dom';

const HEADING = '[data-page-heading]';

/** After a navigation the focus goes to the new page's heading, and its title is read aloud. */
export function RouteFocus() {
  const { pathname } = useLocation();
  const seen = useRef(pathname);
  const [said, setSaid] = useState('');
  useEffect(() => {
    if (seen.current === pathname) return;
    seen.current = pathname;
    window.scrollTo(0, 0);
    const focus = () => {
      const heading = document.querySelector<HTMLElement>(HEADING);
      heading?.focus({ preventScroll: true });
      setSaid(document.title);
      return heading !== null;
    };
    let observer: MutationObserver | null = null;
    const frame = requestAnimationFrame(() => {
      if (focus()) return;
      observer = new MutationObserver(() => {
        if (document.querySelector(HEADING) && focus()) observer?.disconnect();
      });
      observer.observe(document.body, { childList: true, subtree: true });
    });
    const giveUp = setTimeout(() => observer?.disconnect(), 5000);
    return () => {
      cancelAnimationFrame(frame);
      clearTimeout(giveUp);
      observer?.disconnect();
    };
  }, [pathname]);
  return (
    <div aria-live="polite" className="sr-only">
      {said}
    </div>
  );
}
