/** One file, dropped or chosen: a file field with a large target, for the keyboard too. */
import { useState } from 'react';

interface DropFileProps {
  readonly label: string;
  readonly onFile: (file: File) => void;
}

export function DropFile({ label, onFile }: DropFileProps) {
  const [over, setOver] = useState(false);
  const take = (files: FileList | null) => {
    const file = files?.[0];
    if (file !== undefined) onFile(file);
  };
  return (
    <label
      className={`drop ${over ? 'over' : ''}`}
      onDragOver={(event) => {
        event.preventDefault();
        setOver(true);
      }}
      onDragLeave={() => setOver(false)}
      onDrop={(event) => {
        event.preventDefault();
        setOver(false);
        take(event.dataTransfer.files);
      }}
    >
      <b className="block pb-2">{label}</b>
      <input
        type="file"
        accept=".zip,application/zip"
        onChange={(event) => {
          take(event.target.files);
          event.target.value = '';
        }}
      />
    </label>
  );
}
