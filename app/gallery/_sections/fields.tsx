'use client';

import { useState } from 'react';
import { Button } from '@/lib/ui/actions/button';
import type { Problem } from '@/lib/ui/api';
import { CheckField } from '@/lib/ui/fields/check-field';
import { DateField } from '@/lib/ui/fields/date-field';
import { Form } from '@/lib/ui/fields/form';
import { NumberField } from '@/lib/ui/fields/number-field';
import { PasswordField } from '@/lib/ui/fields/password-field';
import { RadioGroup } from '@/lib/ui/fields/radio-group';
import { SelectField } from '@/lib/ui/fields/select-field';
import { TextAreaField } from '@/lib/ui/fields/text-area-field';
import { TextField } from '@/lib/ui/fields/text-field';

const textures = [
  { value: 'sand', label: 'Sandy' },
  { value: 'loam', label: 'Loam' },
  { value: 'clay', label: 'Clay' },
];

const refusal: Problem = {
  type: 'urn:loamline:problem:invalid',
  title: 'Something in this request needs a change',
  status: 422,
  code: 'invalid',
  detail: 'Two fields need another look.',
  fields: {
    plot: 'Give the plot a name, so that you find it again.',
    ph: 'pH runs from 0 to 14; this says 64. Did you mean 6.4?',
  },
};

export function FieldsSection() {
  const [sent, setSent] = useState('');
  return (
    <div className="grid items-start gap-x-12 gap-y-10 lg:grid-cols-2">
      <Form label="Plot, as it starts" onSubmit={(values) => setSent(JSON.stringify(values))}>
        <TextField name="plot" label="Plot name" hint="As you call it on the bag." defaultValue="North bed" />
        <NumberField name="ph" label="pH" hint="Write 6.4 or 6,4." defaultValue="6,4" className="max-w-48" />
        <NumberField name="area" label="Area" unit="sq ft" className="max-w-64" />
        <SelectField name="texture" label="Soil" options={textures} prompt="Not said" optional />
        <DateField name="day" label="Day the cores were taken" defaultValue="2026-05-03" />
        <RadioGroup
          name="ground"
          label="Ground"
          defaultValue="old"
          options={[
            { value: 'new', label: 'New ground', hint: 'Broken within the last three years.' },
            { value: 'old', label: 'Old ground' },
          ]}
        />
        <RadioGroup
          name="depth"
          label="Depth"
          inline
          defaultValue="6"
          options={[
            { value: '6', label: '6 in' },
            { value: '8', label: '8 in' },
            { value: 'x', label: 'Another' },
          ]}
        />
        <CheckField
          name="control"
          label="Keep this plot untreated, to compare with"
          hint="It makes the effect check much surer."
        />
        <TextAreaField name="notes" label="Notes" optional />
        <PasswordField
          name="password"
          label="Password"
          autoComplete="new-password"
          hint="At least 12 characters; a sentence is good."
        />
        <TextField name="locked" label="Laboratory" defaultValue="Set by the report" readOnly />
        <div className="flex flex-wrap gap-3">
          <Button type="submit">Save this plot</Button>
        </div>
        <p className="text-sm break-all text-clay" role="status">
          {sent}
        </p>
      </Form>
      <Form label="Plot, refused" problem={refusal} onSubmit={() => undefined}>
        <TextField name="plot" label="Plot name" hint="As you call it on the bag." />
        <NumberField name="ph" label="pH" defaultValue="64" />
        <SelectField name="texture" label="Soil" options={textures} error="Pick the one that is nearest." />
        <RadioGroup
          name="ground"
          label="Ground"
          error="Say which, so that the right guide is used."
          options={[
            { value: 'new', label: 'New ground' },
            { value: 'old', label: 'Old ground' },
          ]}
        />
        <CheckField name="agree" label="These are my own results" error="Tick this to go on." />
      </Form>
    </div>
  );
}
