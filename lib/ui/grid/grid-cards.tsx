'use client';

import { ChevronDown, Trash2 } from 'lucide-react';
import { useEffect, useId, useLayoutEffect, useRef, useState } from 'react';
import { Button } from '../actions/button';
import type { GridBodyProps } from './body-props';
import { CellNotes, type ConflictActions, ConflictChoice, hasNotes } from './cell-notes';
import { rowHeaderOf } from './cell-value';
import { acceptable, type CellView, viewOf } from './cell-view';
import type { GridRow } from './types';

type CardsProps = GridBodyProps & { readonly onRemoveRow?: ((rowId: string) => void) | undefined };

/** Below 640 px: one analyte a card, the same edits in plain fields. */
export function GridCards(props: CardsProps) {
  const { labelledBy, rows, cursor } = props;
  const list = useRef<HTMLUListElement>(null);
  const at = useRef('');
  at.current = `${cursor.active.row}:${cursor.active.column}`;
  useLayoutEffect(() => {
    if (cursor.focusTurn === 0) return;
    const field = list.current?.querySelector<HTMLElement>(`[data-cell="${at.current}"]`);
    field?.focus();
  }, [cursor.focusTurn]);
  return (
    <ul ref={list} aria-labelledby={labelledBy} className="grid gap-3">
      {rows.map((row, index) => (
        <Card key={row.id} row={row} rowIndex={index} {...props} />
      ))}
    </ul>
  );
}

function Card({ row, rowIndex, ...props }: CardsProps & { row: GridRow; rowIndex: number }) {
  const { columns, edits, readOnly } = props;
  const header = rowHeaderOf(columns);
  const views = columns.map((column) => viewOf({ row, column, overlay: edits.overlay, header, readOnly }));
  const title = views.find((view) => view.column.id === header?.id)?.shown || 'Row without a name';
  return (
    <li className="border border-fallow border-l-4 border-l-fallow bg-white focus-within:border-l-gley">
      <div className="flex items-baseline justify-between gap-2 border-b border-fallow/50 bg-silt px-3 py-2">
        <h3 className="text-base">
          <span className="mr-2 font-figures text-sm font-normal text-clay">{rowIndex + 1}</span>
          {title}
          {row.subtitle ? <span className="ml-2 font-text text-sm font-normal text-clay">{row.subtitle}</span> : null}
        </h3>
        {row.place ? <span className="text-xs text-clay">{row.place}</span> : null}
      </div>
      <div className="grid grid-cols-2 gap-x-3 gap-y-2 p-3">
        {views.map((view, columnIndex) =>
          view.column.id === header?.id && !view.editable ? null : (
            <CardField
              key={view.column.id}
              view={view}
              version={row.version ?? null}
              at={`${rowIndex}:${columnIndex}`}
              onFocus={() => {
                props.cursor.follow({ row: rowIndex, column: columnIndex });
                props.onFocusCell(row.id, view.column.id);
              }}
              {...props}
            />
          ),
        )}
      </div>
      {props.onRemoveRow && !readOnly && !row.readOnly ? (
        <div className="border-t border-fallow/50 px-3 py-1">
          <Button
            look="plain"
            size="small"
            className="-ml-3 min-h-(--target)"
            icon={<Trash2 aria-hidden="true" className="size-4" />}
            onClick={() => props.onRemoveRow?.(row.id)}
          >
            Remove row<span className="sr-only"> {title}</span>
          </Button>
        </div>
      ) : null}
    </li>
  );
}

interface FieldProps extends CardsProps {
  readonly view: CellView;
  readonly version: number | null;
  readonly at: string;
  readonly onFocus: () => void;
}

function CardField({ view, version, at, onFocus, edits, onAcceptDoubt }: FieldProps) {
  const id = useId();
  const notesId = useId();
  const noted = hasNotes(view);
  const cell = { rowId: view.rowId, columnId: view.column.id };
  const write = (value: string, seen?: { before: string; version: number | null }) =>
    edits.write('edit', [{ ...cell, value, ...(seen ? { seen } : {}) }]);
  const wide = (noted && view.state.kind !== 'saving') || view.column.rowHeader;
  const shared = {
    id,
    'data-cell': at,
    'aria-invalid': view.doubts.length > 0 || ['invalid', 'error', 'conflict'].includes(view.state.kind) || undefined,
    'aria-describedby': noted ? notesId : undefined,
    'aria-label': view.name,
    className: `field-box scroll-mt-40 scroll-mb-24 ${view.column.kind === 'number' ? 'font-figures' : ''} ${view.doubts.length > 0 ? 'border-ochre! bg-ochre-wash!' : ''}`,
    onFocus,
  };
  const actions: ConflictActions = edits;
  return (
    <div className={wide ? 'relative col-span-2' : 'relative'}>
      <label htmlFor={id} className="text-xs font-semibold text-clay">
        {view.column.header}
      </label>
      {view.editable && view.column.kind === 'select' ? (
        <div className="relative">
          <select {...shared} value={view.value} onChange={(event) => write(event.target.value)}>
            {view.column.options?.some((one) => one.value === view.value) ? null : (
              <option value={view.value}>{view.value || '(empty)'}</option>
            )}
            {view.column.options?.map((option) => (
              <option key={option.value} value={option.value}>
                {option.label}
              </option>
            ))}
          </select>
          <ChevronDown
            aria-hidden="true"
            className="pointer-events-none absolute top-1/2 right-3 size-5 -translate-y-1/2 text-clay"
          />
        </div>
      ) : view.editable ? (
        <DraftInput
          shared={shared}
          value={view.value}
          version={version}
          number={view.column.kind === 'number'}
          onWrite={write}
        />
      ) : (
        <input {...shared} type="text" readOnly value={view.shown} />
      )}
      {noted ? <CellNotes view={view} id={notesId} /> : null}
      {view.state.kind === 'conflict' ? (
        <ConflictChoice view={view} conflict={view.state} actions={actions} inGrid={false} />
      ) : null}
      {acceptable(view) && onAcceptDoubt ? (
        <Button look="quiet" size="small" className="mt-1" onClick={() => onAcceptDoubt(cell)}>
          It is right<span className="sr-only">, {view.name}</span>
        </Button>
      ) : null}
    </div>
  );
}

/** Holds what is being typed until it is left, so that new rows from the server do not reach it. */
function DraftInput({
  shared,
  value,
  version,
  number,
  onWrite,
}: {
  shared: React.ComponentProps<'input'>;
  value: string;
  version: number | null;
  number: boolean;
  onWrite: (value: string, seen: { before: string; version: number | null }) => void;
}) {
  const [draft, setDraft] = useState<{ text: string; before: string; version: number | null } | null>(null);
  const held = useRef(draft);
  useEffect(() => {
    held.current = draft;
  }, [draft]);
  const finish = () => {
    if (held.current) onWrite(held.current.text, held.current);
    setDraft(null);
  };
  return (
    <input
      {...shared}
      type="text"
      inputMode={number ? 'decimal' : 'text'}
      autoComplete="off"
      spellCheck={false}
      enterKeyHint="done"
      value={draft ? draft.text : value}
      onChange={(event) => {
        const text = event.target.value;
        setDraft((now) => ({ text, before: now?.before ?? value, version: now ? now.version : version }));
      }}
      onBlur={finish}
      onKeyDown={(event) => {
        if (event.key === 'Enter' && !event.nativeEvent.isComposing) {
          event.preventDefault();
          finish();
        }
        if (event.key === 'Escape') setDraft(null);
      }}
    />
  );
}
