/** The packages of a consignment, each with its seal and what is in it. */
import { Button } from '../../components/ui/button.tsx';
import { TextField } from '../../components/ui/text-field.tsx';

interface Package {
  readonly seal: string;
  readonly content: string;
}

interface PackagesProps {
  readonly rows: readonly Package[];
  readonly onChange: (rows: readonly Package[]) => void;
  readonly errorOf: (field: string) => string | null;
}

export function Packages({ rows, onChange, errorOf }: PackagesProps) {
  const change = (at: number, row: Package) => onChange(rows.map((one, index) => (index === at ? row : one)));
  return (
    <>
      {rows.map((row, at) => (
        <div key={at} className="fields mb-4">
          <TextField
            label={`Seal of package ${at + 1}`}
            value={row.seal}
            onChange={(seal) => change(at, { ...row, seal })}
            error={errorOf(`packages.${at}.seal`)}
          />
          <TextField
            label="What is in it"
            value={row.content}
            onChange={(content) => change(at, { ...row, content })}
            error={errorOf(`packages.${at}.content`)}
          />
          {rows.length === 1 ? null : (
            <Button kind="quiet" onPress={() => onChange(rows.filter((_, index) => index !== at))}>
              Take package {at + 1} away
            </Button>
          )}
        </div>
      ))}
      <Button icon="plus" onPress={() => onChange([...rows, { seal: '', content: '' }])}>
        Add a package
      </Button>
    </>
  );
}
