/** The keys of the program, shown by "?"; single-key shortcuts are switched off here. */
import { useCallback, useState } from 'react';
import { CheckBox } from '../components/ui/choice.tsx';
import { Dialog } from '../components/ui/dialog.tsx';
import { shortcutsAreOn, switchShortcuts, useShortcut } from '../lib/shortcuts.ts';

const KEYS = [
  ['/', 'Goes to the scan field: a lot’s code, a voucher’s number, a name, or a page such as “rec”'],
  ['?', 'Shows these keys'],
  ['Arrow keys', 'Go from figure to figure in a table, from point to point in a chart'],
  ['Enter', 'Opens what is chosen; in a field it never posts'],
  ['Escape', 'Closes what is open and goes back'],
] as const;

export function KeysHelp() {
  const [open, setOpen] = useState(false);
  const [on, setOn] = useState(shortcutsAreOn);
  useShortcut(
    '?',
    useCallback(() => setOpen(true), []),
  );
  return (
    <Dialog
      title="Which keys do what?"
      open={open}
      keep="Back to the sheet"
      onClose={() => setOpen(false)}
      action={null}
    >
      <dl className="keys">
        {KEYS.map(([key, words]) => (
          <div key={key}>
            <dt>
              <kbd>{key}</kbd>
            </dt>
            <dd>{words}</dd>
          </div>
        ))}
      </dl>
      <CheckBox
        label="Single keys (/ and ?) work on this device"
        checked={on}
        onChange={(next) => {
          setOn(next);
          switchShortcuts(next);
        }}
      />
    </Dialog>
  );
}
