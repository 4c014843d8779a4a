/** What waits for a second person: what would be posted and why it needs two; signed or refused here. */
import { Empty } from '../../components/ui/empty.tsx';
import { Page, Section } from '../../components/ui/page.tsx';
import { momentText, words } from '../../lib/formats.ts';
import { useSignatureRequests } from '../../queries/signatures.ts';
import { Decision } from './decision.tsx';
import { RequestPreview } from './request-preview.tsx';

export function SignaturesPage() {
  const requests = useSignatureRequests();
  const many = requests.length;
  return (
    <Page
      title="Second signatures"
      lede={many === 0 ? 'none waits' : many === 1 ? 'one waits' : `${many} wait`}
      margin={<p>Whoever asked for an act can’t sign it. Nothing is posted before it is signed.</p>}
      first={
        many === 0 ? (
          <Empty
            what="Nothing waits for a signature."
            words="Reversals, corrections, write-offs and losses over their allowance show here until a second person has decided."
          />
        ) : null
      }
    >
      {requests.map((request) => (
        <Section
          key={request.id}
          heading={words(request.event)}
          notes={
            <p>
              Asked for by {request.requested_by_name}, {momentText(request.requested_at)}.
            </p>
          }
        >
          <p className="mt-0 font-semibold">{request.reason}</p>
          <RequestPreview preview={request.preview} />
          <Decision request={request} />
        </Section>
      ))}
    </Page>
  );
}
