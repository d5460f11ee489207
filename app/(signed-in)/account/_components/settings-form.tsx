'use client';

import { useRouter } from 'next/navigation';
import type { Me } from '@/lib/schemas/people';
import { Button } from '@/lib/ui/actions/button';
import { useAnnounce } from '@/lib/ui/feedback/announce';
import { Form } from '@/lib/ui/fields/form';
import { RadioGroup } from '@/lib/ui/fields/radio-group';
import { type Option, SelectField } from '@/lib/ui/fields/select-field';
import { TextField } from '@/lib/ui/fields/text-field';
import { useSubmit } from '@/lib/ui/use-submit';

/** Not at night: mail that comes at three is mail that annoys. */
const HOURS: Option[] = Array.from({ length: 14 }, (_, index) => {
  const hour = index + 6;
  const twelve = hour > 12 ? `${hour - 12} pm` : hour === 12 ? 'noon' : `${hour} am`;
  return { value: String(hour), label: `${String(hour).padStart(2, '0')}:00 (${twelve})` };
});

export function SettingsForm({ me, zones }: { me: Me; zones: readonly Option[] }) {
  const { send, busy, problem } = useSubmit<Me>();
  const announce = useAnnounce();
  const router = useRouter();
  const save = async (values: Record<string, string>) => {
    const body = {
      name: values.name,
      units: values.units,
      paper: values.paper,
      timeZone: values.timeZone,
      mailHour: Number(values.mailHour),
    };
    const result = await send('people/me', { method: 'PATCH', body });
    if (!result.ok) return;
    announce('Your settings are kept.', { tone: 'saved' });
    router.refresh();
  };
  const hours = HOURS.some((hour) => hour.value === String(me.mailHour))
    ? HOURS
    : [...HOURS, { value: String(me.mailHour), label: `${String(me.mailHour).padStart(2, '0')}:00` }];
  return (
    <Form problem={problem} onSubmit={save}>
      <TextField name="name" label="Your name" autoComplete="name" defaultValue={me.name} />
      <RadioGroup
        name="units"
        label="Units"
        defaultValue={me.units}
        options={[
          { value: 'us', label: 'US customary', hint: 'pounds, feet, inches; rates per 1,000 sq ft' },
          { value: 'metric', label: 'Metric', hint: 'kilograms, metres, centimetres; rates per square metre' },
        ]}
      />
      <RadioGroup
        name="paper"
        label="Paper for what you print"
        inline
        defaultValue={me.paper}
        options={[
          { value: 'letter', label: 'Letter' },
          { value: 'a4', label: 'A4' },
        ]}
      />
      <SelectField name="timeZone" label="Time zone" options={zones} defaultValue={me.timeZone} />
      <SelectField
        name="mailHour"
        label="Reminders arrive from"
        hint="In your time zone, at most one mail a day."
        options={hours}
        defaultValue={String(me.mailHour)}
      />
      <div>
        <Button type="submit" busy={busy} busyLabel="Saving">
          Save these settings
        </Button>
      </div>
    </Form>
  );
}
