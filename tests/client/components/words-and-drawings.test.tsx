/** What is drawn is also said: status words, index plates, lot chips, bars, rosettes, buttons that can't be used yet. */
import { fireEvent, render, screen } from '@testing-library/react';
import { readFileSync } from 'node:fs';
import { MemoryRouter } from 'react-router-dom';
import { describe, expect, it } from 'vitest';
import { LotChip } from '../../../src/components/domain/lot-chip.tsx';
import { Button } from '../../../src/components/ui/button.tsx';
import { CompositionBar } from '../../../src/components/ui/composition-bar.tsx';
import { ErrorSummary } from '../../../src/components/ui/error-summary.tsx';
import { ICONS } from '../../../src/components/ui/icon.tsx';
import { IndexPlate, SmallIndex } from '../../../src/components/ui/index-plate.tsx';
import { STATUS_TONES, StatusWord } from '../../../src/components/ui/status-word.tsx';
import type { Status } from '../../../src/components/ui/status-word.tsx';
import { TextField } from '../../../src/components/ui/text-field.tsx';
import { rosettePaths } from '../../../src/lib/rosette-paths.ts';

const isStatus = (word: string): word is Status => Object.hasOwn(STATUS_TONES, word);

describe('status words', () => {
  const MARK_OF = { verd: '#ok', brass: '#near', rouge: '#bad', pickle: '#wait', ink: '#hold' } as const;

  it.each(Object.keys(STATUS_TONES).filter(isStatus))('“%s” has a word, a mark and a colour', (status) => {
    const { container } = render(<StatusWord status={status} />);
    const tone = STATUS_TONES[status];
    expect(container.textContent).toBe(status);
    expect(container.querySelector('use')?.getAttribute('href')).toBe(MARK_OF[tone]);
    expect(container.firstElementChild?.className).toBe(`status ${tone}`);
  });

  it('can be completed by a figure', () => {
    const { container } = render(<StatusWord status="Acknowledged" after="10:43" />);
    expect(container.textContent).toBe('Acknowledged 10:43');
  });
});

it('every mark is in the sprite, and every mark of the sprite has a name', () => {
  const sprite = readFileSync('src/assets/icons.svg', 'utf8');
  const drawn = [...sprite.matchAll(/<symbol id="([a-z]+)"/g)].map(([, id]) => id);
  expect([...ICONS].sort()).toEqual(drawn.sort());
});

describe('index plates', () => {
  it('are named by the whole finding', () => {
    render(
      <IndexPlate
        value={0.441}
        limit={0.526}
        limitName="allowance 0.526"
        finding="Loss of 0.441 g, inside the allowance of 0.526 g"
      />,
    );
    expect(
      screen.getByRole('img', { name: 'Loss of 0.441 g, inside the allowance of 0.526 g' }),
    ).toBeTruthy();
  });

  it('keep the pointer on the scale where the value is nothing or far beyond', () => {
    for (const value of [0, 5000]) {
      const { container, unmount } = render(
        <IndexPlate value={value} limit={0.5} limitName="allowance" finding={`Loss of ${value} g`} />,
      );
      const start = /M([\d.]+) /.exec(container.querySelector('path:last-child')?.getAttribute('d') ?? '');
      const x = Number.parseFloat(start?.[1] ?? 'NaN');
      expect(x).toBeGreaterThanOrEqual(0);
      expect(x).toBeLessThanOrEqual(560);
      unmount();
    }
  });

  it('hatch only what passes the limit', () => {
    const { container, rerender } = render(<SmallIndex share={0.9} finding="90 % of the limit" />);
    expect(container.querySelectorAll('rect')).toHaveLength(1);
    rerender(<SmallIndex share={1.1} finding="10 % over the limit" />);
    expect(container.querySelectorAll('rect')).toHaveLength(2);
  });
});

describe('lot chips', () => {
  const chip = (standing?: string) =>
    render(
      <MemoryRouter>
        <LotChip id="l1" code="G26-0516-N" form="grain" description="999.9 gold grain" standing={standing} />
      </MemoryRouter>,
    );

  it('are links that set the check character apart', () => {
    const { container } = chip();
    expect(screen.getByRole('link').getAttribute('href')).toBe('/lots/l1');
    expect(container.querySelector('.check-char')?.textContent).toBe('-N');
    expect(container.querySelector('use')?.getAttribute('href')).toBe('#grain');
  });

  it('say that a lot is on hold, with a lock instead of its form', () => {
    const { container } = chip('on_hold');
    expect(container.textContent).toContain('on hold');
    expect(container.querySelector('use')?.getAttribute('href')).toBe('#hold');
  });

  it('say that a lot is spent', () => {
    expect(chip('spent').container.textContent).toContain('spent');
  });
});

describe('composition', () => {
  it('names each metal per thousand, base metal too, and the parts make the whole', () => {
    render(
      <CompositionBar
        masses={{
          gross_g: '214.306000',
          gold_g: '160.815000',
          silver_g: '26.703000',
          platinum_g: '0.000000',
          palladium_g: '0.000000',
        }}
      />,
    );
    expect(
      screen.getByRole('group', { name: 'Per thousand: Gold 750.4, Silver 124.6, Base metal 125' }),
    ).toBeTruthy();
  });
});

describe('rosettes', () => {
  const HASH = '9c41e7305bd82af6114c7e90a3d5b826ff03917e5c2da8460b9e13d7724fa86c';

  it('are the same for the same hash', () => {
    expect(rosettePaths(HASH, 98)).toEqual(rosettePaths(HASH, 98));
  });

  it('differ where any of the first eight bytes changes its figure', () => {
    const changed = [0, 1, 2, 3, 4, 5, 6, 7].map((byte) => {
      const at = byte * 2;
      return `${HASH.slice(0, at)}01${HASH.slice(at + 2)}`;
    });
    for (const hash of changed) expect(rosettePaths(hash, 98)).not.toEqual(rosettePaths(HASH, 98));
  });

  it('stay inside their radius', () => {
    const far = rosettePaths(HASH, 100)
      .flatMap((path) => path.replace(/[MZ]/g, '').split('L'))
      .map((point) => Math.hypot(...point.split(' ').map((part) => Number.parseFloat(part))));
    expect(Math.max(...far)).toBeLessThanOrEqual(100);
  });
});

describe('buttons', () => {
  it('that are not possible yet can be focused and say why', () => {
    let pressed = 0;
    render(
      <Button notYet="Weigh the empty dish first." onPress={() => (pressed += 1)}>
        Post the weigh-back
      </Button>,
    );
    const button = screen.getByRole('button', { name: 'Post the weigh-back' });
    fireEvent.click(button);
    expect(pressed).toBe(0);
    expect(button.getAttribute('aria-disabled')).toBe('true');
    expect(document.getElementById(button.getAttribute('aria-describedby') ?? '')?.textContent).toBe(
      'Weigh the empty dish first.',
    );
  });

  it('do nothing on a second press while sending', () => {
    let pressed = 0;
    render(
      <Button busy="Posting …" onPress={() => (pressed += 1)}>
        Post
      </Button>,
    );
    fireEvent.click(screen.getByRole('button', { name: 'Posting …' }));
    expect(pressed).toBe(0);
  });
});

describe('the error summary', () => {
  const SENTENCE = 'Tare is heavier than gross. Weigh the empty dish again.';

  it('takes the focus, counts, and leads to the field that a sentence stands beside', () => {
    render(
      <>
        <ErrorSummary
          shown
          errors={[
            { field: 'lines.0.tare_g', sentence: SENTENCE },
            { field: null, sentence: 'Lot G26-0516-N is on hold until its melt check is recorded.' },
          ]}
        />
        <TextField label="Tare" value="50" onChange={() => undefined} error={SENTENCE} />
      </>,
    );
    const summary = screen.getByRole('alert');
    expect(document.activeElement).toBe(summary);
    expect(summary.textContent).toContain('Two things keep this from being posted');
    fireEvent.click(screen.getByRole('button', { name: SENTENCE }));
    expect(document.activeElement).toBe(screen.getByRole('textbox', { name: 'Tare' }));
  });
});
