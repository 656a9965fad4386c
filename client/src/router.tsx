import { Suspense, lazy } from 'react';
import type { ComponentType } from 'react';
import { Route, Routes, useLocation } from 'react-router-dom';
import { ErrorBoundary } from './ui/error-boundary';
import { Loading } from './ui/states';

/** A page in a piece of its own, loaded when it is first gone to. */
function page<Name extends string>(load: () => Promise<Record<Name, ComponentType>>, name: Name) {
  return lazy(async () => ({ default: (await load())[name] }));
}

const DeskLayout = page(() => import('./routes/desk-layout'), 'DeskLayout');
const SignedInLayout = page(() => import('./routes/signed-in-layout'), 'SignedInLayout');
const CircleLayout = page(() => import('./routes/circle-layout'), 'CircleLayout');

const SignInPage = page(() => import('./routes/sign-in-page'), 'SignInPage');
const RegisterPage = page(() => import('./routes/register-page'), 'RegisterPage');
const HomePage = page(() => import('./routes/home-page'), 'HomePage');
const EveningsPage = page(() => import('./routes/evenings-page'), 'EveningsPage');
const BoardPage = page(() => import('./routes/board-page'), 'BoardPage');
const ConsolePage = page(() => import('./routes/console-page'), 'ConsolePage');
const TunesPage = page(() => import('./routes/tunes-page'), 'TunesPage');
const ImportPage = page(() => import('./routes/import-page'), 'ImportPage');
const TuningsPage = page(() => import('./routes/tunings-page'), 'TuningsPage');
const PeoplePage = page(() => import('./routes/people-page'), 'PeoplePage');
const RecordPage = page(() => import('./routes/record-page'), 'RecordPage');
const NotFoundPage = page(() => import('./routes/not-found-page'), 'NotFoundPage');

// The phone's pages stand outside the desk layout: Chakra is loaded there and nowhere else.
const CodePage = page(() => import('./routes/code-page'), 'CodePage');
const FollowPage = page(() => import('./routes/follow-page'), 'FollowPage');
const RoomPage = page(() => import('./routes/room-page'), 'RoomPage');

export function AppRoutes() {
  const { pathname } = useLocation();
  return (
    <ErrorBoundary resetKey={pathname}>
      <Suspense fallback={<Loading what="the page" />}>
        <Routes>
          <Route path="/f" element={<CodePage />} />
          <Route path="/f/:code" element={<FollowPage />} />
          <Route path="/f/:code/room" element={<RoomPage />} />
          <Route element={<DeskLayout />}>
            <Route path="/sign-in" element={<SignInPage />} />
            <Route path="/register" element={<RegisterPage />} />
            <Route element={<SignedInLayout />}>
              <Route path="/" element={<HomePage />} />
              <Route path="/c/:circleId" element={<CircleLayout />}>
                <Route index element={<EveningsPage />} />
                <Route path="evenings" element={<EveningsPage />} />
                <Route path="evenings/:sessionId" element={<BoardPage />} />
                <Route path="evenings/:sessionId/live" element={<ConsolePage />} />
                <Route path="tunes" element={<TunesPage />} />
                <Route path="tunes/import" element={<ImportPage />} />
                <Route path="tunings" element={<TuningsPage />} />
                <Route path="people" element={<PeoplePage />} />
                <Route path="record" element={<RecordPage />} />
              </Route>
            </Route>
            <Route path="*" element={<NotFoundPage />} />
          </Route>
        </Routes>
      </Suspense>
    </ErrorBoundary>
  );
}
