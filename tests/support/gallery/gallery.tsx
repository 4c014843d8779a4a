/**
 * Every component with its states on one sheet, for looking at and for the accessibility check: never part of the
 * product. `?theme=charcoal` shows the other theme.
 */
import { StrictMode, useState } from 'react';
import { createRoot } from 'react-dom/client';
import { MemoryRouter } from 'react-router-dom';
import { LotChip } from '../../../src/components/domain/lot-chip.tsx';
import { Button } from '../../../src/components/ui/button.tsx';
import { Choices } from '../../../src/components/ui/choice.tsx';
import { CompositionBar } from '../../../src/components/ui/composition-bar.tsx';
import { Dialog } from '../../../src/components/ui/dialog.tsx';
import { Empty } from '../../../src/components/ui/empty.tsx';
import { ErrorSummary } from '../../../src/components/ui/error-summary.tsx';
import { Figure, LabelledFigure } from '../../../src/components/ui/figure.tsx';
import { Guilloche } from '../../../src/components/ui/guilloche.tsx';
import { ICONS, Icon, IconSprite } from '../../../src/components/ui/icon.tsx';
import { IndexPlate, SmallIndex } from '../../../src/components/ui/index-plate.tsx';
import { LineChart } from '../../../src/components/ui/line-chart.tsx';
import { MetalKey } from '../../../src/components/ui/metal-key.tsx';
import { Notice } from '../../../src/components/ui/notice.tsx';
import { Page, Section } from '../../../src/components/ui/page.tsx';
import { RegisterTable } from '../../../src/components/ui/register-table.tsx';
import { Rosette } from '../../../src/components/ui/rosette.tsx';
import { SelectField } from '../../../src/components/ui/select-field.tsx';
import { STATUS_TONES, StatusWord } from '../../../src/components/ui/status-word.tsx';
import type { Status } from '../../../src/components/ui/status-word.tsx';
import { TextField } from '../../../src/components/ui/text-field.tsx';
import { ToastProvider, useToast } from '../../../src/components/ui/toast.tsx';
import { WeightField } from '../../../src/components/ui/weight-field.tsx';
import '../../../src/styles/main.css';

const HASH = '9c41e7305bd82af6114c7e90a3d5b826ff03917e5c2da8460b9e13d7724fa86c';

interface Bench {
  readonly name: string;
  readonly gross: string;
  readonly fine: string;
}

const BENCHES: readonly Bench[] = [
  { name: 'Bench 1', gross: '82.460', fine: '61.845' },
  { name: 'Bench 4, chosen', gross: '144.100', fine: '108.075' },
  { name: 'Bench 12', gross: '9.400', fine: '7.050' },
];

const isStatus = (word: string): word is Status => word in STATUS_TONES;

function Fields() {
  const [gross, setGross] = useState('142.900');
  return (
    <Section heading="Fields" notes="Label, hint, error, field.">
      <div className="fields">
        <WeightField label="Gross" value={gross} onChange={setGross} />
        <WeightField label="Invoice weight" value="" onChange={() => undefined} />
        <WeightField
          label="Net"
          value="541.286"
          onChange={() => undefined}
          error="Bench 4 holds 144.100 g. More can’t come back than went out."
        />
        <WeightField
          label="Fineness, fixed by the alloy"
          value="750"
          unit="per 1000"
          fixed
          onChange={() => undefined}
        />
        <SelectField
          label="Period"
          value="april"
          onChange={() => undefined}
          options={[{ value: 'april', label: '1 to 30 April 2026' }]}
        />
        <TextField label="Reason" hint="In a sentence" value="Wrong bench" onChange={() => undefined} />
      </div>
      <Choices
        legend="The weight is outside the agreed tolerance. What happens with this line?"
        value="accept"
        onChange={() => undefined}
        choices={[
          { value: 'accept', label: 'Accept as weighed', words: 'Supplier owes 0.126 g' },
          { value: 'claim', label: 'Claim', words: 'Hold, write to supplier' },
          { value: 'back', label: 'Send back', words: 'Nothing enters the safe' },
        ]}
      />
    </Section>
  );
}

function Acts() {
  const toast = useToast();
  const [open, setOpen] = useState(new URLSearchParams(location.search).has('dialog'));
  return (
    <Section heading="Buttons and messages">
      <div className="flex flex-wrap gap-2">
        <Button kind="primary" counter>
          Post the weigh-back
        </Button>
        <Button counter>Leave for later</Button>
        <Button kind="primary" onPress={() => toast({ words: 'Voucher 4 813 posted.', to: '/' })}>
          Post
        </Button>
        <Button notYet="Weigh the empty dish first.">Not yet</Button>
        <Button kind="primary" busy="Posting …">
          Post
        </Button>
        <Button icon="print">Print</Button>
        <Button kind="danger" icon="undo" onPress={() => setOpen(true)}>
          Reverse voucher
        </Button>
        <Button kind="quiet">Show all</Button>
      </div>
      <Notice severity="waiting" what="Corin Dask has not acknowledged">
        210.300 g of silver wire for 47 minutes.
      </Notice>
      <Notice severity="agreed" what="Counted and agreed.">
        Safe, drawer 2, within weighing error.
      </Notice>
      <Notice severity="near" what="Palladium came out 10.4 % low." action={<Button>Open it</Button>}>
        0.99 g of 1.105 g.
      </Notice>
      <Notice severity="fault" what="Someone was quicker.">
        38.214 g was taken by bench 2 a moment ago; 12.006 g is left.
      </Notice>
      <ErrorSummary
        shown
        errors={[
          {
            field: 'gross_g',
            sentence: 'Bench 4 holds 144.100 g. More can’t come back than went out.',
          },
          { field: null, sentence: 'Lot G26-0516-N is on hold until its melt check is recorded.' },
        ]}
      />
      <Dialog
        title="Reverse voucher 4 798?"
        open={open}
        keep="Keep it"
        onClose={() => setOpen(false)}
        action={
          <Button kind="danger" icon="undo">
            Ask for a second signature
          </Button>
        }
      >
        <p>142.900 g of G26-0512 goes back from bench 4 to the safe. The voucher stays in the book.</p>
        <TextField label="Reason" value="Wrong bench" onChange={() => undefined} />
      </Dialog>
    </Section>
  );
}

function Figures() {
  return (
    <Section heading="Figures" notes="Fine, gross, loss.">
      <div className="figures">
        <LabelledFigure label="Fine gold" under="gross 214.306 g, fineness 750.4">
          <Figure size={1} text="160.815" unit="g" />
        </LabelledFigure>
        <LabelledFigure label="Working loss" under="0.77 % of worked, allowance 0.526 g">
          <Figure text="0.612" unit="g" rouge />
        </LabelledFigure>
      </div>
      <IndexPlate
        value={0.612}
        limit={0.526}
        error={0.021}
        limitName="allowance 0.526"
        finding="Loss of 0.612 g, over the allowance of 0.526 g"
      />
      <IndexPlate
        value={-0.126}
        limit={0.1}
        both
        error={0.004}
        limitName="tolerance 0.100"
        finding="0.126 g short, outside the tolerance of 0.100 g"
      />
      <p>
        <SmallIndex share={0.6} finding="60 % of the limit" />{' '}
        <SmallIndex share={1.2} finding="20 % over the limit" />
      </p>
      <CompositionBar
        masses={{
          gross_g: '214.306000',
          gold_g: '160.815000',
          silver_g: '26.703000',
          platinum_g: '0.000000',
          palladium_g: '1.200000',
        }}
      />
      <LineChart
        title="Loss of sheet work"
        unit="per cent of worked"
        labels={['Jan', 'Feb', 'Mar', 'Apr', 'May']}
        limit={0.66}
        lines={[
          { name: 'gross', tone: 'rouge', points: [0.52, 0.61, 0.49, 0.74, 0.56] },
          { name: 'net', tone: 'verd', points: [0.11, 0.13, 0.1, null, null] },
        ]}
      />
    </Section>
  );
}

function Words() {
  return (
    <Section heading="Words and marks">
      <div className="flex flex-wrap gap-x-6 gap-y-2">
        {Object.keys(STATUS_TONES)
          .filter(isStatus)
          .map((status) => (
            <StatusWord key={status} status={status} />
          ))}
      </div>
      <div className="my-4 flex flex-wrap gap-4">
        {(['gold', 'silver', 'platinum', 'palladium', 'base'] as const).map((metal) => (
          <MetalKey key={metal} metal={metal} />
        ))}
      </div>
      <div className="my-4 flex flex-wrap gap-2">
        <LotChip id="a" code="G26-0512-V" form="sheet" description="750 yellow sheet" />
        <LotChip id="b" code="G26-0516-N" form="grain" description="999.9" standing="on_hold" />
        <LotChip id="c" code="W26-0031-A" form="sweeps" description="sweeps, est." standing="spent" />
      </div>
      <div className="flex flex-wrap gap-4">
        {ICONS.map((name) => (
          <span key={name} className="grid place-items-center text-xs">
            <Icon name={name} size={28} />
            {name}
          </span>
        ))}
      </div>
      <div className="my-4 flex flex-wrap items-center gap-6">
        <Rosette hash={HASH} name="Rosette of the chain head" />
        <Guilloche />
      </div>
    </Section>
  );
}

function Tables() {
  return (
    <Section heading="Tables">
      <RegisterTable
        caption="Benches"
        rows={BENCHES}
        rowKey={(bench) => bench.name}
        rowTone={(bench) => (bench.name.includes('chosen') ? 'chosen' : '')}
        columns={[
          {
            id: 'place',
            head: 'Place',
            cell: (bench) => <a href={`#${bench.name}`}>{bench.name}</a>,
            value: (bench) => bench.name,
          },
          {
            id: 'gross_g',
            head: 'Gross, g',
            figure: 'gross',
            cell: (bench) => bench.gross,
            value: (bench) => bench.gross,
          },
          {
            id: 'gold_g',
            head: 'Fine, g',
            figure: 'fine',
            cell: (bench) => bench.fine,
            value: (bench) => bench.fine,
          },
        ]}
        total={['All', '235.960', '176.970']}
        csv="benches"
        empty="Nothing is out of the safe."
      />
      <Empty
        what="Nothing is out of the safe."
        words="What you issue shows here with its holder and since when."
        action={<Button icon="out">Issue metal</Button>}
      />
    </Section>
  );
}

const theme = new URLSearchParams(location.search).get('theme');
if (theme !== null) document.documentElement.dataset['theme'] = theme;

const root = document.getElementById('root');
if (root !== null)
  createRoot(root).render(
    <StrictMode>
      <MemoryRouter>
        <ToastProvider>
          <IconSprite />
          <Page title="Every component" lede="with its states" actions={<Button icon="print">Print</Button>}>
            <Fields />
            <Acts />
            <Figures />
            <Words />
            <Tables />
          </Page>
        </ToastProvider>
      </MemoryRouter>
    </StrictMode>,
  );
