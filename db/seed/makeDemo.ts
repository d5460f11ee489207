import { person } from '@/db/schema';
import type { Role } from '@/lib/access/table';
import { recordApplication } from '@/lib/data/applications/recordApplication';
import { database } from '@/lib/data/database';
import { recheckEffects } from '@/lib/data/effects/recheckEffects';
import { setRule } from '@/lib/data/reminders/setRule';
import { createTargetSet } from '@/lib/data/targets/createTargetSet';
import { personOn, workerOn } from './clock';
import { withdrawMails } from './mailbox';
import { idOf, type MadeSite, makeGround } from './makeGround';
import { inviteMembers, signUpAs } from './makePeople';
import { confirm, sendAndRead } from './makeReports';
import { CINDER_LANE, WEIR_COTTAGE } from './otherSites';
import { PEOPLE, SIGN_INS } from './people';
import { SLOE_BANK } from './sloeBank';
import type { DemoEvent, DemoSite } from './types';

export type DemoAccount = { role: Role; email: string; password: string };

const SITES = [SLOE_BANK, CINDER_LANE, WEIR_COTTAGE];
const LAST_DAY = '2026-11-30';
/** As many as the worker reads at a time. */
const AT_ONCE = 3;

async function inParallel<T>(items: readonly T[], run: (item: T) => Promise<void>): Promise<void> {
  const left = [...items];
  const takeTurns = async () => {
    for (let item = left.shift(); item !== undefined; item = left.shift()) await run(item);
  };
  await Promise.all(Array.from({ length: AT_ONCE }, takeTurns));
}

async function play(made: MadeSite, reports: ReadonlyMap<string, string>, event: DemoEvent): Promise<void> {
  const { siteId, plots } = made;
  if (event.kind === 'confirm') await confirm(siteId, reports, event);
  else {
    const ctx = await personOn(event.on, PEOPLE[event.by].email);
    if (event.kind === 'targets') await createTargetSet({ ctx, input: { siteId, ...event.input } });
    else if (event.kind === 'rule') {
      const plotId = idOf(plots, event.plot);
      await setRule({ ctx, input: { siteId, plotId, kind: event.rule, active: true } });
    } else {
      const plotId = idOf(plots, event.plot);
      await recordApplication({ ctx, input: { siteId, plotId, appliedOn: event.on, ...event.input } });
    }
  }
  if (event.kind === 'targets' || event.kind === 'rule') return;
  const [first] = plots.values();
  if (first !== undefined) await recheckEffects({ ctx: await workerOn(event.on), input: { siteId, id: first } });
}

async function makeSite(site: DemoSite, made: MadeSite, reports: ReadonlyMap<string, string>): Promise<void> {
  for (const event of [...site.events].sort((a, b) => (a.on < b.on ? -1 : 1))) await play(made, reports, event);
}

/** Nothing at all where anybody has an account already. */
export async function makeDemo(): Promise<{ made: true; accounts: DemoAccount[] } | { made: false }> {
  const [somebody] = await database().select({ id: person.id }).from(person).limit(1);
  if (somebody) return { made: false };
  for (const one of Object.values(PEOPLE)) await signUpAs(one);
  const grounds: { site: DemoSite; made: MadeSite; reports: Map<string, string> }[] = [];
  for (const site of SITES) {
    const made = await makeGround(site);
    await inviteMembers(made.siteId, site);
    grounds.push({ site, made, reports: new Map() });
  }
  const files = grounds.flatMap(({ site, made, reports }) => site.reports.map((report) => ({ report, made, reports })));
  await inParallel(files, async ({ report, made, reports }) => {
    reports.set(report.file, await sendAndRead(made, report));
  });
  for (const { site, made, reports } of grounds) await makeSite(site, made, reports);
  await withdrawMails(LAST_DAY);
  const accounts = SIGN_INS.map(({ role, who }) => {
    const { email, password } = PEOPLE[who];
    return { role, email, password };
  });
  return { made: true, accounts };
}
