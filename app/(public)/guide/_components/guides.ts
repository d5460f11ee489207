export type Guide = { href: string; label: string; said: string };

export const GUIDES: readonly Guide[] = [
  {
    href: '/guide/upload-and-review',
    label: 'Upload and review a report',
    said: 'From the file a laboratory sent to values you have confirmed yourself.',
  },
  {
    href: '/guide/record-what-was-spread',
    label: 'Record what was spread',
    said: 'Material, amount, day and the change you mean it to make.',
  },
  {
    href: '/guide/reminders',
    label: 'Reminders',
    said: 'When the next sample is due, and the mail that says so.',
  },
  {
    href: '/guide/method',
    label: 'How Loamline decides whether it worked',
    said: 'The seven verdicts, the noise they are set against, and where each figure comes from.',
  },
  {
    href: '/guide/trust',
    label: 'What you can rely on, and what is missing',
    said: 'How your data is kept apart and kept safe today, and the gaps we know of.',
  },
  {
    href: '/guide/growth',
    label: 'Running it for more people',
    said: 'More web and worker processes, your own PostgreSQL, object store and mail.',
  },
];
