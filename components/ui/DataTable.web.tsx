import ArrowDown from 'lucide-react-native/icons/arrow-down';
import ArrowUp from 'lucide-react-native/icons/arrow-up';
import { useMemo, useState, type ReactElement, type ReactNode } from 'react';
import { useIsNarrow } from '@/components/theme/breakpoints';
import { Icon } from '@/components/ui/Icon';
import { TableScroll } from '@/components/ui/TableScroll';

export interface Column<Row> {
  /** Name of the column, also its key. */
  header: string;
  /** What stands in the cell. The first column names the row. */
  cell: (row: Row) => ReactNode;
  /** Right for numbers, which then have figures of equal width. */
  align?: 'left' | 'right';
  /** Makes the column sortable by this value; empty values come last. */
  sortBy?: (row: Row) => number | string | null;
  /** Left out where tables become cards. */
  wideOnly?: boolean;
}

export interface DataTableProps<Row> {
  /** What the table is; heard, and seen when `showCaption`. */
  caption: string;
  showCaption?: boolean;
  columns: readonly Column<Row>[];
  rows: readonly Row[];
  rowKey: (row: Row) => string;
  /** Key of the row whose detail stands beside the table. */
  selectedKey?: string;
  /** Shown instead of a table without rows. */
  empty: ReactNode;
}

interface Order {
  header: string;
  descending: boolean;
}

function sorted<Row>(rows: readonly Row[], column: Column<Row> | undefined, descending: boolean): readonly Row[] {
  const { sortBy } = column ?? {};
  if (!sortBy) return rows;
  const direction = descending ? -1 : 1;
  return [...rows].sort((first, second) => {
    const [a, b] = [sortBy(first), sortBy(second)];
    if (a === null || b === null) return Number(a === null) - Number(b === null);
    if (typeof a === 'number' && typeof b === 'number') return direction * (a - b);
    return direction * String(a).localeCompare(String(b), undefined, { numeric: true, sensitivity: 'base' });
  });
}

/** A real table; under 500 px each row becomes a card that names its values. Rows come in the order given until a header is pressed. */
export function DataTable<Row>({ caption, showCaption, columns, rows, rowKey, selectedKey, empty }: DataTableProps<Row>): ReactElement {
  const narrow = useIsNarrow();
  const [order, setOrder] = useState<Order | null>(null);
  const shown = useMemo(
    () => sorted(rows, columns.find((column) => column.header === order?.header), order?.descending ?? false),
    [rows, columns, order],
  );
  const [first, ...others] = columns;
  if (rows.length === 0 || !first) return <>{empty}</>;

  if (narrow) {
    return (
      <div className="d-rows">
        <p className={showCaption ? 'd-caption' : 'd-hidden'}>{caption}</p>
        <ul aria-label={caption}>
          {shown.map((row) => (
            <li key={rowKey(row)} className="d-row-card" data-selected={rowKey(row) === selectedKey ? '' : undefined}>
              <div className="d-row-title">{first.cell(row)}</div>
              <dl>
                {others.filter((column) => !column.wideOnly).map((column) => (
                  <div key={column.header}>
                    <dt>{column.header}</dt>
                    <dd>{column.cell(row)}</dd>
                  </div>
                ))}
              </dl>
            </li>
          ))}
        </ul>
      </div>
    );
  }

  return (
    <TableScroll label={caption}>
      <table className="d-table">
        <caption className={showCaption ? 'd-caption' : 'd-hidden'}>{caption}</caption>
        <thead>
          <tr>
            {columns.map((column) => {
              const active = order?.header === column.header ? order : null;
              return (
                <th key={column.header} scope="col" data-align={column.align} aria-sort={active ? (active.descending ? 'descending' : 'ascending') : undefined}>
                  {column.sortBy ? (
                    <button type="button" className="d-sort" onClick={() => setOrder({ header: column.header, descending: active ? !active.descending : false })}>
                      {column.header}
                      {active && <Icon icon={active.descending ? ArrowDown : ArrowUp} size={16} />}
                    </button>
                  ) : column.header}
                </th>
              );
            })}
          </tr>
        </thead>
        <tbody>
          {shown.map((row) => (
            <tr key={rowKey(row)} data-selected={rowKey(row) === selectedKey ? '' : undefined}>
              <th scope="row">{first.cell(row)}</th>
              {others.map((column) => (
                <td key={column.header} data-align={column.align}>{column.cell(row)}</td>
              ))}
            </tr>
          ))}
        </tbody>
      </table>
    </TableScroll>
  );
}
