import { emailExamples } from '@/lib/emails/examples';
import { env } from '@/lib/env';

const NOT_FOUND = { status: 404, headers: { 'content-type': 'text/plain; charset=utf-8' } } as const;

/** The HTML part of one example mail, as a mail program would show it. Mail needs inline styles, and nothing else. */
export async function GET(_request: Request, { params }: { params: Promise<{ name: string }> }): Promise<Response> {
  const { name } = await params;
  const make = Object.hasOwn(emailExamples, name) ? emailExamples[name] : undefined;
  if (!env().gallery || make === undefined) return new Response('Not found', NOT_FOUND);
  const { html } = await make();
  return new Response(html, {
    headers: {
      'content-type': 'text/html; charset=utf-8',
      'content-security-policy': "default-src 'none'; style-src 'unsafe-inline'",
      'x-robots-tag': 'noindex',
    },
  });
}
