import { describe, expect, it } from 'vitest';
import { addressTaken, addressTakenExample } from './address-taken';
import { emailExamples } from './examples';
import { invitation, invitationExample } from './invitation';
import { passwordChanged, passwordChangedExample } from './password-changed';
import { reminderDigest, reminderDigestExample } from './reminder-digest';
import { reminderDue, reminderDueExample } from './reminder-due';
import { reportReady, reportReadyExample } from './report-ready';
import { resetPassword, resetPasswordExample } from './reset-password';
import type { Email } from './types';
import { verifyAddress, verifyAddressExample } from './verify-address';
import { UnsafeSubjectError } from './words';

const EVIL = '<img src=x onerror=alert(1)>';
const item = reminderDueExample.item;

/** Every user value of every message set to markup. */
const withMarkup: Record<string, () => Promise<Email>> = {
  verifyAddress: () => verifyAddress({ ...verifyAddressExample, name: EVIL }),
  addressTaken: () => addressTaken({ ...addressTakenExample, name: EVIL }),
  resetPassword: () => resetPassword({ ...resetPasswordExample, name: EVIL }),
  passwordChanged: () => passwordChanged({ ...passwordChangedExample, name: EVIL }),
  invitation: () => invitation({ ...invitationExample, inviterName: EVIL, siteName: EVIL }),
  reminderDue: () =>
    reminderDue({
      ...reminderDueExample,
      name: EVIL,
      item: { ...item, plotName: EVIL, siteName: EVIL, because: EVIL, sampleLikeThis: EVIL },
    }),
  reminderDigest: () =>
    reminderDigest({ ...reminderDigestExample, name: EVIL, items: [{ ...item, plotName: EVIL, siteName: EVIL }] }),
  reportReady: () =>
    reportReady({ ...reportReadyExample, name: EVIL, fileName: EVIL, siteName: EVIL, plotNames: [EVIL] }),
};

const links = (text: string): string[] => text.match(/https?:\/\/[^\s"<>]+/g) ?? [];
const hrefs = (html: string): string[] => [...html.matchAll(/href="([^"]*)"/g)].map((m) => m[1] ?? '');

describe.each(Object.entries(emailExamples))('%s', (_name, make) => {
  it('has a subject, its own text and HTML that calls nothing from afar', async () => {
    const mail = await make();
    expect(mail.subject.length).toBeGreaterThan(10);
    expect(mail.text.length).toBeGreaterThan(80);
    expect(mail.text).not.toMatch(/<\/?[a-z]+[ >]/i);
    expect(mail.html).toContain('<!DOCTYPE html');
    expect(mail.html).toMatch(/<html[^>]*lang="en"/);
    expect(mail.html).not.toMatch(/<(img|script|iframe|link)\b|url\(|@import|background=/i);
  });

  it('carries the same links in text and HTML, all absolute', async () => {
    const mail = await make();
    const inHtml = new Set(hrefs(mail.html));
    expect(inHtml.size).toBeGreaterThan(0);
    for (const href of inHtml) expect(href).toMatch(/^https:\/\/loamline\.example\//);
    expect(new Set(links(mail.text))).toEqual(inHtml);
  });
});

describe.each(Object.entries(withMarkup))('%s with markup in every user value', (_name, make) => {
  it('shows it as text', async () => {
    const mail = await make();
    expect(mail.html).not.toContain('<img');
    expect(mail.html).toContain('&lt;img src=x onerror=alert(1)&gt;');
  });
});

describe('subjects', () => {
  it('name plot and day', async () => {
    expect((await reminderDue(reminderDueExample)).subject).toBe('Sample North bed, due 20 May 2026');
    expect((await reminderDigest(reminderDigestExample)).subject).toBe(
      'Samples due, 20 May 2026: North bed and Marrow ground',
    );
    expect((await reportReady(reportReadyExample)).subject).toBe(
      'Report ready to review: North bed and 2 more, 12 April 2026',
    );
  });

  const injected = 'a\r\nBcc: everyone@example.org';
  it.each<[string, () => Promise<Email>]>([
    ['plot name of a reminder', () => reminderDue({ ...reminderDueExample, item: { ...item, plotName: injected } })],
    ['day of a reminder', () => reminderDue({ ...reminderDueExample, item: { ...item, dueOn: injected } })],
    [
      'plot name of a digest',
      () => reminderDigest({ ...reminderDigestExample, items: [{ ...item, plotName: injected }] }),
    ],
    ['inviter', () => invitation({ ...invitationExample, inviterName: injected })],
    ['site of an invitation', () => invitation({ ...invitationExample, siteName: injected })],
    ['file name of a report', () => reportReady({ ...reportReadyExample, plotNames: [], fileName: injected })],
  ])('refuse a line break in the %s', async (_what, make) => {
    await expect(make()).rejects.toThrow(UnsafeSubjectError);
  });
});

describe('reminders', () => {
  it('carry both ways out and both answers, in text and HTML', async () => {
    const mail = await reminderDue(reminderDueExample);
    for (const url of [
      reminderDueExample.unsubscribeUrl,
      reminderDueExample.preferencesUrl,
      item.snoozeUrl,
      item.alreadySampledUrl,
    ]) {
      expect(mail.text).toContain(url);
      expect(mail.html).toContain(url);
    }
  });

  it('list every plot of a digest with its own links', async () => {
    const mail = await reminderDigest(reminderDigestExample);
    for (const one of reminderDigestExample.items) {
      expect(mail.text).toContain(`${one.plotName} (${one.siteName}), due ${one.dueOn}`);
      expect(mail.text).toContain(one.snoozeUrl);
    }
  });

  it('shortens a long list of plots in the subject', async () => {
    const items = ['A', 'B', 'C', 'D', 'E'].map((plotName) => ({
      ...item,
      plotName,
      plotUrl: `${item.plotUrl}/${plotName}`,
    }));
    expect((await reminderDigest({ ...reminderDigestExample, items })).subject).toBe(
      'Samples due, 20 May 2026: A, B and 3 more',
    );
  });

  it('refuse a link that is no web address', async () => {
    await expect(reminderDue({ ...reminderDueExample, unsubscribeUrl: 'javascript:alert(1)' })).rejects.toThrow(
      /web address/,
    );
  });
});

describe('mail about the account', () => {
  it('offers no unsubscribe link', async () => {
    for (const name of ['verifyAddress', 'addressTaken', 'resetPassword', 'passwordChanged', 'invitation']) {
      const mail = await emailExamples[name]?.();
      expect(mail?.text).toBeDefined();
      expect(mail?.text).not.toContain('Stop these mails');
    }
  });
});

describe('a changed password', () => {
  it.each([
    ['all', 'Every device was signed out.'],
    ['others', 'Every other device was signed out.'],
  ] as const)('says who was signed out (%s)', async (signedOut, words) => {
    expect((await passwordChanged({ ...passwordChangedExample, signedOut })).text).toContain(words);
  });
  it('promises nothing when nobody was', async () => {
    const mail = await passwordChanged({ ...passwordChangedExample, signedOut: 'none' });
    expect(mail.text).not.toContain('signed out');
  });
});

describe('a report that could not be read', () => {
  it('says why and that the file is kept', async () => {
    const mail = await emailExamples.reportNotRead?.();
    expect(mail?.subject).toBe('Report could not be read: spring-report.pdf');
    expect(mail?.text).toContain('The file is locked with a password.');
    expect(mail?.text).toContain('The file is kept.');
  });
});
