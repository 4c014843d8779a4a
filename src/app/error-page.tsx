/** What stands where a page could not be shown: in plain words, with a way on. */
import { isRouteErrorResponse, useRouteError } from 'react-router-dom';
import { Button } from '../components/ui/button.tsx';
import { IconSprite } from '../components/ui/icon.tsx';
import { Notice } from '../components/ui/notice.tsx';
import { Page } from '../components/ui/page.tsx';
import { ApiProblem, OfflineError } from '../lib/api-client.ts';

export function ErrorPage() {
  const error = useRouteError();
  const missing = isRouteErrorResponse(error) && error.status === 404;
  const title = missing ? 'Not found' : 'This page can’t be shown';
  return (
    <>
      <IconSprite />
      <Page
        title={title}
        first={
          <div className="mt-4">
            <Notice
              severity={missing ? 'near' : 'fault'}
              what={missing ? 'There is nothing at this address.' : sentence(error)}
            >
              What you typed elsewhere is kept.
            </Notice>
            <Button icon="back" onPress={() => window.location.assign('/')}>
              To the first page
            </Button>
          </div>
        }
      />
    </>
  );
}

function sentence(error: unknown): string {
  if (error instanceof ApiProblem || error instanceof OfflineError) return error.message;
  return 'Something failed on our side. Open the page again; if it happens twice, tell whoever runs Grainward.';
}
