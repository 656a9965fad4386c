import { Navigate, Route, Routes } from 'react-router-dom';
import { lazyPage } from '../lib/lazy-page';
import { CircleLayout } from './circle-layout';
import { DeskLayout } from './desk-layout';
import { NotFoundPage } from './not-found-page';
import { SignedInLayout } from './signed-in-layout';

const SignInPage = lazyPage(() => import('./sign-in-page'), 'SignInPage');
const RegisterPage = lazyPage(() => import('./register-page'), 'RegisterPage');
const ForgotPage = lazyPage(() => import('./forgot-page'), 'ForgotPage');
const ResetPage = lazyPage(() => import('./reset-page'), 'ResetPage');
const ConfirmPage = lazyPage(() => import('./confirm-page'), 'ConfirmPage');
const AccountPage = lazyPage(() => import('./account-page'), 'AccountPage');
const HomePage = lazyPage(() => import('./home-page'), 'HomePage');
const EveningsPage = lazyPage(() => import('./evenings-page'), 'EveningsPage');
const EveningNewPage = lazyPage(() => import('./evening-new-page'), 'EveningNewPage');
const BoardPage = lazyPage(() => import('./board-page'), 'BoardPage');
const ConsolePage = lazyPage(() => import('./console-page'), 'ConsolePage');
const RacksPage = lazyPage(() => import('./racks-page'), 'RacksPage');
const TunesPage = lazyPage(() => import('./tunes-page'), 'TunesPage');
const TunePage = lazyPage(() => import('./tune-page'), 'TunePage');
const TuneNewPage = lazyPage(() => import('./tune-new-page'), 'TuneNewPage');
const TuneEditPage = lazyPage(() => import('./tune-edit-page'), 'TuneEditPage');
const ImportPage = lazyPage(() => import('./import-page'), 'ImportPage');
const TuningsPage = lazyPage(() => import('./tunings-page'), 'TuningsPage');
const PeoplePage = lazyPage(() => import('./people-page'), 'PeoplePage');
const HistoryPage = lazyPage(() => import('./history-page'), 'HistoryPage');
const RecordPage = lazyPage(() => import('./record-page'), 'RecordPage');

/** Every page that is planned and read at a desk, inside the frame. */
export function DeskRoutes() {
  return (
    <Routes>
      <Route element={<DeskLayout />}>
        <Route path="/sign-in" element={<SignInPage />} />
        <Route path="/register" element={<RegisterPage />} />
        <Route path="/forgot" element={<ForgotPage />} />
        <Route path="/reset" element={<ResetPage />} />
        <Route path="/confirm" element={<ConfirmPage />} />
        <Route element={<SignedInLayout />}>
          <Route path="/" element={<HomePage />} />
          <Route path="/account" element={<AccountPage />} />
          <Route path="/c/:circleId" element={<CircleLayout />}>
            <Route index element={<Navigate to="evenings" replace />} />
            <Route path="evenings" element={<EveningsPage />} />
            <Route path="evenings/new" element={<EveningNewPage />} />
            <Route path="evenings/:sessionId" element={<BoardPage />} />
            <Route path="evenings/:sessionId/live" element={<ConsolePage />} />
            <Route path="evenings/:sessionId/racks" element={<RacksPage />} />
            <Route path="tunes" element={<TunesPage />} />
            <Route path="tunes/new" element={<TuneNewPage />} />
            <Route path="tunes/:tuneId" element={<TunePage />} />
            <Route path="tunes/:tuneId/edit" element={<TuneEditPage />} />
            <Route path="tunes/import" element={<ImportPage />} />
            <Route path="tunings" element={<TuningsPage />} />
            <Route path="people" element={<PeoplePage />} />
            <Route path="history" element={<HistoryPage />} />
            <Route path="record" element={<RecordPage />} />
          </Route>
        </Route>
        <Route path="*" element={<NotFoundPage />} />
      </Route>
    </Routes>
  );
}
