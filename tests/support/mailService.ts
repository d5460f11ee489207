import { mkdtempSync, rmSync } from 'node:fs';
import http from 'node:http';
import { tmpdir } from 'node:os';
import path from 'node:path';
import { startMail } from '../../fake-services/mail/server.mjs';
import { listen } from '../../fake-services/support/http.mjs';

export type Letter = { to: string[]; subject: string; idempotency_key: string | null };

/**
 * A mailbox of the test's own, behind a door that can keep the provider's answer back: the mail is in the box, and the
 * worker that sent it has not heard so.
 */
export async function startMailService() {
  const folder = mkdtempSync(path.join(tmpdir(), 'loamline-mail-'));
  const apiKey = process.env.RESEND_API_KEY ?? '';
  let box: Awaited<ReturnType<typeof startMail>> | null = await startMail({ folder, port: 0, apiKey });
  const { port } = box;
  let holding = false;
  let held: (() => void)[] = [];

  async function pass(request: http.IncomingMessage, response: http.ServerResponse) {
    const parts: Buffer[] = [];
    for await (const part of request) parts.push(part as Buffer);
    const headers: Record<string, string> = {};
    for (const name of ['authorization', 'content-type', 'idempotency-key'])
      if (typeof request.headers[name] === 'string') headers[name] = request.headers[name];
    const answer = await fetch(`http://127.0.0.1:${port}${request.url}`, {
      method: request.method ?? 'GET',
      headers,
      ...(parts.length > 0 ? { body: Buffer.concat(parts) } : {}),
    });
    const body = Buffer.from(await answer.arrayBuffer());
    if (holding) await new Promise<void>((resolve) => held.push(resolve));
    response.writeHead(answer.status, { 'content-type': answer.headers.get('content-type') ?? 'application/json' });
    response.end(body);
  }

  const door = http.createServer((request, response) => {
    // No answer from behind the door is no answer at all.
    pass(request, response).catch(() => response.destroy());
  });
  const { url, close } = await listen(door, 0);
  return {
    url: String(url),
    letters: async (): Promise<Letter[]> => {
      const answer = await fetch(`http://127.0.0.1:${port}/box.json`);
      return (await answer.json()) as Letter[];
    },
    holdAnswers: () => {
      holding = true;
    },
    letAnswersGo: () => {
      holding = false;
      for (const go of held) go();
      held = [];
    },
    goDown: async () => {
      await box?.close();
      box = null;
    },
    comeUp: async () => {
      box = await startMail({ folder, port, apiKey });
    },
    stop: async () => {
      await close();
      await box?.close();
      rmSync(folder, { recursive: true, force: true });
    },
  };
}
