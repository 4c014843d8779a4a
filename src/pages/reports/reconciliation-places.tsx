/** The places of a reconciliation, metal by metal, each figure opening the vouchers of its place and days. */
import { Fragment } from 'react';
import { Link } from 'react-router-dom';
import { gramsText } from '../../../shared/mass/grams-text.ts';
import { METALS } from '../../../shared/mass/vector.ts';
import type { ReconciliationJson } from '../../../shared/schemas/reports.ts';
import { Empty } from '../../components/ui/empty.tsx';
import type { IconName } from '../../components/ui/icon.tsx';
import { Icon } from '../../components/ui/icon.tsx';
import { Swatch, metalName } from '../../components/ui/metal-key.tsx';
import { gramsFigure, isNothing, ugFigure } from '../../lib/formats.ts';
import { paths } from '../../app/paths.ts';

type Place = ReconciliationJson['places'][number];
const FIGURES = ['opening_g', 'in_g', 'out_g', 'loss_g', 'closing_g'] as const;
const HEADS: Readonly<Record<(typeof FIGURES)[number], string>> = {
  opening_g: 'Opening',
  in_g: 'In',
  out_g: 'Out',
  loss_g: 'Of it working loss',
  closing_g: 'Closing, book',
};

const MARKS: Readonly<Record<string, IconName>> = {
  safe: 'safe',
  bench: 'bench',
  station: 'station',
  bin: 'bin',
  courier: 'courier',
  refiner: 'refiner',
};

export function PlacesTable({ report }: { readonly report: ReconciliationJson }) {
  const metals = METALS.filter((metal) => report.places.some((place) => place.metal === metal));
  if (metals.length === 0)
    return (
      <Empty what="Nothing lay anywhere in these days." words="Places show here once they hold metal." />
    );
  return (
    <div className="table-region" role="region" aria-label="Reconciliation by place" tabIndex={0}>
      <table className="register">
        <caption className="sr-only">Reconciliation by place, in fine grams</caption>
        <thead>
          <tr>
            <th scope="col">Place</th>
            {FIGURES.map((key) => (
              <th key={key} scope="col" className="num">
                {HEADS[key]}
              </th>
            ))}
          </tr>
        </thead>
        <tbody>
          {metals.map((metal) => {
            const places = report.places.filter((place) => place.metal === metal);
            return (
              <Fragment key={metal}>
                <tr>
                  <th scope="rowgroup" colSpan={FIGURES.length + 1} className="pt-5">
                    <Swatch metal={metal} /> <b>{metalName(metal)}, fine grams</b>
                  </th>
                </tr>
                {places.map((place) => (
                  <PlaceRow key={place.account_id} place={place} report={report} />
                ))}
                <tr className="total">
                  <th scope="row">{metalName(metal)}, all places</th>
                  {FIGURES.map((key) => (
                    <td key={key} className="num">
                      {ugFigure(places.reduce((sum, place) => sum + gramsText(place[key]), 0n))}
                    </td>
                  ))}
                </tr>
              </Fragment>
            );
          })}
        </tbody>
      </table>
    </div>
  );
}

function PlaceRow({ place, report }: { readonly place: Place; readonly report: ReconciliationJson }) {
  const query = new URLSearchParams({ account_id: place.account_id, from: report.from, to: report.to });
  const mark = MARKS[place.kind];
  return (
    <tr>
      <th scope="row">
        {mark === undefined ? null : <Icon name={mark} />} {place.name}
      </th>
      {FIGURES.map((key) => (
        <td key={key} className={`num ${key === 'closing_g' ? 'fine bg-wash' : ''}`}>
          {isNothing(place[key]) ? (
            <span className="none">none</span>
          ) : (
            <Link className="plain" to={`${paths.vouchers}?${query.toString()}`}>
              {gramsFigure(place[key])}
            </Link>
          )}
        </td>
      ))}
    </tr>
  );
}
