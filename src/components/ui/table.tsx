import type { ComponentProps, MouseEvent, ReactNode } from 'react';
import { Link, type LinkProps } from 'react-router';
import { useRowMovement } from './use-row-movement.ts';

interface TableProps {
  /** Names the table for screen readers; shown above it with `showsCaption`. */
  caption: string;
  showsCaption?: boolean;
  /** Scrolls within its own box, for tables wider or longer than the page; the head stays in sight either way. */
  isScrolled?: boolean;
  children: ReactNode;
}

/**
 * A table of hairlines. Rows that open something hold a `RowLink` or `RowButton` in their first cell: one tab
 * stop for the whole list, arrow keys, Home and End between rows, Enter opens.
 */
export function Table({ caption, showsCaption = false, isScrolled = false, children }: TableProps) {
  const ref = useRowMovement();
  const box = isScrolled
    ? 'relative max-h-[75dvh] overflow-auto'
    : 'relative max-columns:overflow-x-auto max-columns:scroll-edge';
  return (
    <div role="region" aria-label={caption} tabIndex={isScrolled ? 0 : undefined} className={box}>
      <table ref={ref} className="w-full border-separate border-spacing-0 text-left">
        <caption className={showsCaption ? 'pb-1 text-left font-serif text-lg' : 'sr-only'}>
          {caption}
        </caption>
        {children}
      </table>
    </div>
  );
}

type Align = 'left' | 'right';

interface HeadProps extends Omit<ComponentProps<'th'>, 'align'> {
  /** Numbers are set right. @default 'left' */
  align?: Align;
  /** The order now in force on this column; `none` offers sorting, `undefined` does not. */
  sort?: 'ascending' | 'descending' | 'none';
  onSort?: () => void;
}

/** A column head; a sortable one is a button that says which way it sorts. */
export function Head({ align = 'left', sort, onSort, children, className = '', ...rest }: HeadProps) {
  const side = align === 'right' ? 'text-right' : 'text-left';
  const arrow = sort === 'ascending' ? '↑' : sort === 'descending' ? '↓' : '';
  return (
    <th
      scope="col"
      {...rest}
      aria-sort={sort}
      className={`sticky top-0 z-2 h-7.5 border-b border-rule bg-(--table-ground,var(--paper)) pr-3 pb-1.5 align-bottom font-normal whitespace-nowrap text-ink-2 first:left-0 first:z-3 ${side} ${className}`}
    >
      {onSort ? (
        <button type="button" onClick={onSort} className="-my-1 min-h-6 py-1 hover:text-ink hover:underline">
          {children}
          <span aria-hidden="true" className="inline-block w-4 font-mono text-xs">
            {arrow}
          </span>
        </button>
      ) : (
        children
      )}
    </th>
  );
}

interface RowProps extends ComponentProps<'tr'> {
  /** The row that is open in the side sheet or chosen in the drawing beside the table. */
  isSelected?: boolean;
}

/** A row, 30 px high. A click anywhere on it does what its `RowLink` or `RowButton` does. */
export function Row({ isSelected = false, className = '', ...rest }: RowProps) {
  return (
    <tr
      {...rest}
      aria-current={isSelected || undefined}
      onClick={(event) => {
        rest.onClick?.(event);
        openRow(event);
      }}
      className={`group/row has-[[data-row]]:cursor-pointer has-[[data-row]]:hover:bg-raised aria-[current=true]:bg-raised has-[[data-row]:focus-visible]:bg-raised ${className}`}
    />
  );
}

interface CellProps extends Omit<ComponentProps<'td'>, 'align'> {
  /** @default 'left' */
  align?: Align;
  /** Registry numbers, readings, hashes. */
  isMono?: boolean;
  /** Makes the cell the row's heading; use it on the first cell. */
  isHeading?: boolean;
}

/** The brass frame of a chosen row, drawn cell by cell: an outline of the row would lie under the sticky cell. */
const CHOSEN =
  'group-aria-[current=true]/row:shadow-[inset_0_2px_var(--brass),inset_0_-2px_var(--brass)] group-aria-[current=true]/row:first:shadow-[inset_2px_2px_var(--brass),inset_0_-2px_var(--brass)] group-aria-[current=true]/row:last:shadow-[inset_-2px_2px_var(--brass),inset_0_-2px_var(--brass)]';

/** A cell; the first of a row stays in sight when the table is scrolled sideways. */
export function Cell({
  align = 'left',
  isMono = false,
  isHeading = false,
  className = '',
  ...rest
}: CellProps) {
  const Tag = isHeading ? 'th' : 'td';
  return (
    <Tag
      scope={isHeading ? 'row' : undefined}
      {...rest}
      className={`h-7.5 border-b border-rule py-1 pr-3 align-baseline font-normal first:sticky first:left-0 first:z-1 first:bg-(--table-ground,var(--paper)) group-hover/row:has-[[data-row]]:bg-raised group-aria-[current=true]/row:first:bg-raised ${CHOSEN} pointer-coarse:h-11 ${
        align === 'right' ? 'text-right' : 'text-left'
      } ${isMono ? 'font-mono text-sm whitespace-nowrap' : ''} ${className}`}
    />
  );
}

/** The link that opens a row; put it around the thing's own number in the first cell. */
export function RowLink({ className = '', ...rest }: LinkProps) {
  return <Link {...rest} data-row="" tabIndex={-1} className={`hover:underline ${className}`} />;
}

/** As `RowLink`, for a row that opens something without an address of its own. */
export function RowButton({ className = '', ...rest }: ComponentProps<'button'>) {
  return (
    <button
      {...rest}
      type="button"
      data-row=""
      tabIndex={-1}
      className={`text-left hover:underline ${className}`}
    />
  );
}

function openRow(event: MouseEvent<HTMLTableRowElement>): void {
  if (event.defaultPrevented || !(event.target instanceof Element)) return;
  if (event.target.closest('a, button, input, select, textarea, label')) return;
  // Marking text in a row is not opening it.
  if (window.getSelection()?.toString()) return;
  event.currentTarget.querySelector<HTMLElement>('[data-row]')?.click();
}
