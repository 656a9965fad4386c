import { ChakraProvider } from '@chakra-ui/react';
import { Suspense, useEffect, useRef } from 'react';
import { Outlet, useLocation } from 'react-router-dom';
import { useLight } from '../theme/light';
import { system } from '../theme/system';
import { ErrorBoundary } from '../ui/error-boundary';
import { Loading } from '../ui/states';
import { StatusProvider } from '../ui/status';
import { Header } from './header';

/** The frame of every planning page: header, the page, the line where things are said. */
export function DeskLayout() {
  const [light, chooseLight] = useLight('desk');
  const { pathname } = useLocation();
  const main = useRef<HTMLElement>(null);
  const shown = useRef(pathname);

  // After a change of page the reading starts at the page, not at the link that was pressed.
  useEffect(() => {
    if (shown.current === pathname) return;
    shown.current = pathname;
    main.current?.focus({ preventScroll: true });
    window.scrollTo(0, 0);
  }, [pathname]);

  return (
    <ChakraProvider value={system}>
      <StatusProvider>
        <Header light={light} onLight={chooseLight} />
        <main id="main" ref={main} tabIndex={-1}>
          <ErrorBoundary resetKey={pathname}>
            <Suspense fallback={<Loading what="the page" />}>
              <Outlet />
            </Suspense>
          </ErrorBoundary>
        </main>
      </StatusProvider>
    </ChakraProvider>
  );
}
