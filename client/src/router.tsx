import { Suspense } from 'react';
import { Route, Routes, useLocation } from 'react-router-dom';
import { lazyPage } from './lib/lazy-page';
import { ErrorBoundary } from './ui/error-boundary';
import { Loading } from './ui/states';

// The phone's pages stand apart from the desk: Chakra comes with the desk and with nothing else.
const CodePage = lazyPage(() => import('./routes/code-page'), 'CodePage');
const FollowPage = lazyPage(() => import('./routes/follow-page'), 'FollowPage');
const RoomPage = lazyPage(() => import('./routes/room-page'), 'RoomPage');
const RetunePage = lazyPage(() => import('./routes/retune-page'), 'RetunePage');
const DeskRoutes = lazyPage(() => import('./routes/desk-routes'), 'DeskRoutes');

export function AppRoutes() {
  const { pathname } = useLocation();
  return (
    <ErrorBoundary resetKey={pathname}>
      <Suspense fallback={<Loading what="the page" />}>
        <Routes>
          <Route path="/f" element={<CodePage />} />
          <Route path="/f/:code" element={<FollowPage />} />
          <Route path="/f/:code/room" element={<RoomPage />} />
          <Route path="/retune" element={<RetunePage />} />
          <Route path="*" element={<DeskRoutes />} />
        </Routes>
      </Suspense>
    </ErrorBoundary>
  );
}
