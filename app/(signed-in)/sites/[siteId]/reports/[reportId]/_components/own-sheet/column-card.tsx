'use client';

import { isMethodKey, isUnitKey } from '@/lib/domain/analytes';
import { type ColumnMeaningInput, SHEET_FORMS, type SheetMapping } from '@/lib/schemas/ownSheets';
import { SelectField } from '@/lib/ui/fields/select-field';
import {
  ANALYTE_CHOICES,
  asAnalyte,
  asKind,
  DEPTH_UNITS,
  FORM_CHOICES,
  hasForms,
  kindOptions,
  methodChoices,
  UNIT_CHOICES,
  unitIsImplied,
} from './meanings';

type ColumnCardProps = {
  readonly column: SheetMapping['columns'][number];
  readonly layout: SheetMapping['layout'];
  readonly onMeaning: (meaning: ColumnMeaningInput) => void;
};

const NOT_GIVEN = 'not given';

/** One column of the sheet: its heading, a few of its cells, and what it holds. */
export function ColumnCard({ column, layout, onMeaning }: ColumnCardProps) {
  const { meaning } = column;
  const name = column.heading || `Column ${column.column}`;
  const id = `column-${column.column}`;
  return (
    <li className="grid gap-x-6 gap-y-2 border-b border-horizon-5 py-3 lg:grid-cols-[14rem_minmax(0,1fr)]">
      <div className="min-w-0">
        <h3 className="text-base font-semibold break-words" id={`${id}-name`}>
          {name}
        </h3>
        <p className="font-figures text-sm break-words text-clay">{column.examples.join(' · ') || 'empty'}</p>
      </div>
      <fieldset
        aria-labelledby={`${id}-name`}
        className="grid grid-cols-2 gap-3 xl:grid-cols-[14.5rem_12.5rem_8rem_minmax(0,1fr)_7.5rem]"
      >
        <SelectField
          name={`${id}-kind`}
          label="Holds"
          className="max-xl:col-span-2"
          options={kindOptions(layout)}
          value={meaning.kind}
          onChange={(event) => onMeaning(asKind(event.currentTarget.value, meaning))}
        />
        {meaning.kind === 'result' ? <ResultFields id={id} meaning={meaning} onMeaning={onMeaning} /> : null}
        {'unit' in meaning && meaning.kind !== 'result' ? (
          <SelectField
            name={`${id}-depth-unit`}
            label="Measured in"
            prompt={NOT_GIVEN}
            options={DEPTH_UNITS}
            value={meaning.unit ?? ''}
            onChange={(event) => {
              const unit = event.currentTarget.value;
              onMeaning({ kind: meaning.kind, unit: unit === 'in' || unit === 'cm' ? unit : null });
            }}
          />
        ) : null}
      </fieldset>
    </li>
  );
}

type Result = Extract<ColumnMeaningInput, { kind: 'result' }>;

function ResultFields({
  id,
  meaning,
  onMeaning,
}: {
  id: string;
  meaning: Result;
  onMeaning: (meaning: ColumnMeaningInput) => void;
}) {
  return (
    <>
      <SelectField
        name={`${id}-analyte`}
        label="Analyte"
        className="max-xl:col-span-2"
        options={ANALYTE_CHOICES}
        value={meaning.analyte}
        onChange={(event) => onMeaning(asAnalyte(event.currentTarget.value, meaning))}
      />
      {unitIsImplied(meaning.analyte) ? null : (
        <SelectField
          name={`${id}-unit`}
          label="Unit"
          prompt={NOT_GIVEN}
          options={UNIT_CHOICES}
          value={meaning.unit ?? ''}
          onChange={(event) => {
            const unit = event.currentTarget.value;
            onMeaning({ ...meaning, unit: isUnitKey(unit) ? unit : null });
          }}
        />
      )}
      <SelectField
        name={`${id}-method`}
        label="Method"
        prompt={NOT_GIVEN}
        options={methodChoices(meaning.analyte)}
        value={meaning.method ?? ''}
        onChange={(event) => {
          const method = event.currentTarget.value;
          onMeaning({ ...meaning, method: isMethodKey(method) ? method : null });
        }}
      />
      {hasForms(meaning.analyte) ? (
        <SelectField
          name={`${id}-form`}
          label="Given as"
          prompt={NOT_GIVEN}
          options={FORM_CHOICES}
          value={meaning.form ?? ''}
          onChange={(event) => {
            const form = SHEET_FORMS.find((one) => one === event.currentTarget.value) ?? null;
            onMeaning({ ...meaning, form });
          }}
        />
      ) : null}
    </>
  );
}
