import { readFile } from 'node:fs/promises';
import { line, median, ms, quantile, timesOf } from './measure';

const POLL_MS = 25;

export type Web = { origin: string; cookie: string };

const same = (web: Web) => ({ cookie: web.cookie, 'sec-fetch-site': 'same-origin' });

export async function get(web: Web, path: string): Promise<Response> {
  const answer = await fetch(`${web.origin}${path}`, { headers: same(web), redirect: 'manual' });
  if (answer.status !== 200) throw new Error(`GET ${path} answered ${answer.status}`);
  await answer.clone().arrayBuffer();
  return answer;
}

/** From the first byte sent to rows that can be reviewed, each turn with a file the site has not seen. */
export async function benchUpload(web: Web, siteId: string, name: string, path: string): Promise<void> {
  const original = await readFile(path);
  let turn = 0;
  const times = await timesOf(
    7,
    async () => {
      turn += 1;
      const bytes = Buffer.concat([original, Buffer.from(`\n% ${turn} ${process.pid}\n%%EOF\n`)]);
      const body = new FormData();
      body.set('file', new File([bytes], `bench-${turn}.pdf`, { type: 'application/pdf' }));
      const url = `${web.origin}/api/v1/sites/${siteId}/uploads`;
      const sent = await fetch(url, { method: 'POST', headers: same(web), body });
      if (!sent.ok) throw new Error(`The upload answered ${sent.status}: ${await sent.text()}`);
      const { reportId } = (await sent.json()) as { reportId: string };
      for (;;) {
        const report = (await (await get(web, `/api/v1/sites/${siteId}/reports/${reportId}`)).json()) as {
          state: string;
        };
        if (report.state === 'in-review') return;
        if (!['received', 'reading'].includes(report.state)) throw new Error(`The report became ${report.state}`);
        await new Promise((resolve) => setTimeout(resolve, POLL_MS));
      }
    },
    1,
  );
  line(`${name}: upload to reviewable rows, median / slowest of 7`, `${ms(median(times))} / ${ms(quantile(times, 1))}`);
}

export async function pageTimes(web: Web, path: string): Promise<number[]> {
  return timesOf(60, () => get(web, path), 10);
}
