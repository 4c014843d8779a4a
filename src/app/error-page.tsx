/** What stands where a page could not be shown: in plain words, with a way on. */
import { Fragment } from 'react';
import { isRouteErrorResponse, useRouteError } from 'react-router-dom';
import { Button } from '../components/ui/button.tsx';
import { IconSprite } from '../components/ui/icon.tsx';
import { Notice } from '../components/ui/notice.tsx';
import type { Severity } from '../components/ui/notice.tsx';
import { Page } from '../components/ui/page.tsx';
import { ApiProblem, OfflineError } from '../lib/api-client.ts';

/** Stands inside the frame, or alone where the frame itself could not be shown. */
export function ErrorPage({ alone = false }: { readonly alone?: boolean }) {
  const error = useRouteError();
  const missing = isRouteErrorResponse(error) && error.status === 404;
  const Ground = alone ? 'main' : Fragment;
  return (
    <Ground>
      {alone ? <IconSprite /> : null}
      {missing ? (
        <NotFound />
      ) : (
        <Told title="This page can’t be shown" severity="fault" what={sentence(error)} />
      )}
    </Ground>
  );
}

interface ToldProps {
  readonly title: string;
  readonly severity: Severity;
  readonly what: string;
}

function Told({ title, severity, what }: ToldProps) {
  return (
    <Page
      title={title}
      first={
        <div className="mt-4">
          <Notice severity={severity} what={what}>
            What you typed elsewhere is kept.
          </Notice>
          <Button icon="back" onPress={() => window.location.assign('/')}>
            To the first page
          </Button>
        </div>
      }
    />
  );
}

/** An address inside that leads nowhere. */
export function NotFound() {
  return <Told title="Not found" severity="near" what="There is nothing at this address." />;
}

function sentence(error: unknown): string {
  if (error instanceof ApiProblem || error instanceof OfflineError) return error.message;
  return 'Something failed on our side. Open the page again; if it happens twice, tell whoever runs Grainward.';
}
