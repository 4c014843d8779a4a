/** The frame of every page: the plate, the index tabs, the bar at the foot of a phone, and the sheet. */
import { Suspense, useEffect, useState } from 'react';
import { useQueryClient } from '@tanstack/react-query';
import { NavLink, Outlet } from 'react-router-dom';
import wordmark from '../assets/wordmark-inline.svg?raw';
import { Guilloche } from '../components/ui/guilloche.tsx';
import { Icon, IconSprite } from '../components/ui/icon.tsx';
import { Page } from '../components/ui/page.tsx';
import { StatusWord } from '../components/ui/status-word.tsx';
import { ToastProvider } from '../components/ui/toast.tsx';
import { numberText } from '../lib/formats.ts';
import { keys } from '../queries/keys.ts';
import { useEnterWorkshop, useSession } from '../queries/session.ts';
import { KeysHelp } from './keys-help.tsx';
import { paths } from './paths.ts';
import { ScanField } from './scan-field.tsx';
import type { Tab } from './tabs.ts';
import { tabsFor } from './tabs.ts';

export function Frame() {
  const session = useSession();
  const tabs = tabsFor(session);
  const online = useOnline();
  useBookStream();
  return (
    <ToastProvider>
      <IconSprite />
      <a className="skip" href="#sheet">
        To the sheet
      </a>
      <header>
        <Plate />
        <Guilloche />
        <nav className="tabs" aria-label="Pages">
          {tabs.map((tab) => (
            <TabLink key={tab.to} tab={tab} />
          ))}
          <span className="end">
            <StatusWord status={session.book.balanced ? 'Book balanced' : 'Book does not balance'} />
            <span className="voucher">voucher {numberText(session.book.sequence)}</span>
          </span>
        </nav>
        {online ? null : (
          <p className="offline on-dark" role="status">
            <Icon name="offline" /> No connection. Drafts are kept here and sent once; figures may have moved.
          </p>
        )}
      </header>
      <main id="sheet">
        <Suspense fallback={<Page title="Grainward" lede="Reading the book …" />}>
          <Outlet />
        </Suspense>
      </main>
      <KeysHelp />
      <nav className="footbar" aria-label="Pages">
        {tabs.slice(0, 5).map((tab) => (
          <NavLink key={tab.to} to={tab.to} end={tab.to === paths.today}>
            <Icon name={tab.icon} size={22} />
            {tab.name === 'Sweeps & refining' ? 'Refining' : tab.name}
          </NavLink>
        ))}
      </nav>
    </ToastProvider>
  );
}

function TabLink({ tab }: { readonly tab: Tab }) {
  return (
    <NavLink to={tab.to} end={tab.to === paths.today}>
      {tab.name}
    </NavLink>
  );
}

function Plate() {
  const session = useSession();
  const enter = useEnterWorkshop();
  const { person, workshop, workshops } = session;
  return (
    <div className="plate on-dark">
      <NavLink
        to={session.can('book.read') ? paths.today : paths.myBench}
        className="wordmark"
        aria-label="Grainward, to the first page"
      >
        <span dangerouslySetInnerHTML={{ __html: wordmark }} />
      </NavLink>
      {workshops.length > 1 ? (
        <select
          aria-label="Workshop"
          value={workshop.id}
          onChange={(event) => void enter(event.target.value)}
        >
          {workshops.map(({ id, name }) => (
            <option key={id} value={id}>
              {name}
            </option>
          ))}
        </select>
      ) : (
        <span className="shop">{workshop.name}</span>
      )}
      <span className="spring" />
      {session.can('book.read') ? <ScanField /> : null}
      <NavLink to={paths.account} className="person">
        <span className="initials" aria-hidden="true">
          {initials(person.name)}
        </span>
        <span className="person-name">
          {person.name}, {person.role}
        </span>
        <span className="sr-only">: my account</span>
      </NavLink>
    </div>
  );
}

function initials(name: string): string {
  const parts = name.split(/\s+/);
  return `${parts[0]?.charAt(0) ?? ''}${parts.length > 1 ? (parts.at(-1)?.charAt(0) ?? '') : ''}`;
}

function useOnline(): boolean {
  const [online, setOnline] = useState(navigator.onLine);
  useEffect(() => {
    const set = () => setOnline(navigator.onLine);
    window.addEventListener('online', set);
    window.addEventListener('offline', set);
    return () => {
      window.removeEventListener('online', set);
      window.removeEventListener('offline', set);
    };
  }, []);
  return online;
}

/** The server tells when the book has moved on; what is on screen is read again. */
function useBookStream(): void {
  const client = useQueryClient();
  useEffect(() => {
    const source = new EventSource('/api/v1/stream');
    source.addEventListener('book', () => {
      void client.invalidateQueries({ queryKey: keys.book });
      void client.invalidateQueries({ queryKey: keys.session });
    });
    return () => source.close();
  }, [client]);
}
