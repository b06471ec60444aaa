import { useState, type CSSProperties, type ReactElement } from 'react';
import type { CupTestResult } from '@/scheduling/sprinkler/cupTest';
import { DataTable } from '@/components/ui/DataTable';
import type { UnitSystem } from '@/shared/contracts/common';
import { formatDepth } from '@/shared/display';
import { cupName, type CupDraft } from './cupDraft';

interface SortedCup { place: number; depthMm: number; isLow: boolean }

export interface CupBarsProps {
  result: CupTestResult;
  kind: CupDraft['kind'];
  columns: number;
  units: UnitSystem;
}

/** All cups from driest to fullest, the lowest quarter hatched; the same as a table below. */
export function CupBars({ result, kind, columns, units }: CupBarsProps): ReactElement {
  const [showsTable, setShowsTable] = useState(false);
  const low = new Set(result.lowQuarterCups);
  const cups: SortedCup[] = result.depthsMm
    .flatMap((depthMm, place) => (depthMm === null ? [] : [{ place, depthMm, isLow: low.has(place) }]))
    .sort((a, b) => a.depthMm - b.depthMm || a.place - b.place);
  const driest = cups[0]?.depthMm ?? 0;
  const fullest = cups.at(-1)?.depthMm ?? 0;
  const depth = (mm: number) => formatDepth(mm, units);
  return (
    <div className="ct-bars-holder">
      <div className="ct-bars" role="img" data-many={cups.length > 60 ? '' : undefined} style={{ '--mean': fullest > 0 ? result.meanMm / fullest : 0 } as CSSProperties}
        aria-label={`${cups.length} cups from the driest, ${depth(driest)}, to the fullest, ${depth(fullest)}. Mean ${depth(result.meanMm)}. The table below has each cup.`}>
        {cups.map(({ place, depthMm, isLow }) => (
          <span key={place} className="ct-bar" data-low={isLow ? '' : undefined} style={{ '--share': fullest > 0 ? depthMm / fullest : 0 } as CSSProperties} />
        ))}
        <span className="ct-mean"><span>{`mean ${depth(result.meanMm)}`}</span></span>
      </div>
      <div className="ct-bars-ends" aria-hidden="true">
        <span>{`driest ${depth(driest)}`}</span>
        <span>{`fullest ${depth(fullest)}`}</span>
      </div>
      <details className="ct-more" onToggle={(event) => setShowsTable(event.currentTarget.open)}>
        <summary>Each cup as a table</summary>
        {showsTable ? (
          <DataTable caption="Cups from driest to fullest" rows={cups} rowKey={(cup) => String(cup.place)} empty={null} columns={[
            { header: 'Cup', cell: (cup) => cupName(kind, columns, cup.place) },
            { header: 'Depth', align: 'right', cell: (cup) => depth(cup.depthMm) },
            { header: 'Lowest quarter', cell: (cup) => (cup.isLow ? 'yes' : 'no') },
          ]} />
        ) : null}
      </details>
    </div>
  );
}
