import { NextRequest } from 'next/server';
import { describe, expect, it } from 'vitest';
import { GET as getMe } from '@/app/api/v1/people/me/route';
import nextConfig from '@/next.config.mjs';
import { config, proxy } from '@/proxy';
import { useWorld } from '../support/factory';

useWorld();

const page = () => proxy(new NextRequest('http://127.0.0.1:3000/sites/a'));
const policyOf = (response: Response) =>
  new Map(
    (response.headers.get('content-security-policy') ?? '').split('; ').map((part): [string, string[]] => {
      const [name = '', ...values] = part.split(' ');
      return [name, values];
    }),
  );

describe('the content policy of a page', () => {
  it('[E 26] lets only scripts with the nonce of this very request run', () => {
    const [one, two] = [policyOf(page()), policyOf(page())];
    const scripts = one.get('script-src') ?? [];
    expect(scripts).toContain("'strict-dynamic'");
    const nonce = scripts.find((value) => value.startsWith("'nonce-"));
    expect(Buffer.from(nonce?.slice(7, -1) ?? '', 'base64')).toHaveLength(16);
    expect(two.get('script-src')).not.toContain(nonce);
    for (const values of one.values()) {
      expect(values).not.toContain("'unsafe-inline'");
      expect(values).not.toContain("'unsafe-eval'");
      expect(values).not.toContain('*');
    }
  });

  it('[E 26] allows no plug-ins, no base, no frame around it, no form to elsewhere', () => {
    const policy = policyOf(page());
    expect(policy.get('object-src')).toEqual(["'none'"]);
    expect(policy.get('base-uri')).toEqual(["'none'"]);
    expect(policy.get('frame-ancestors')).toEqual(["'none'"]);
    expect(policy.get('form-action')).toEqual(["'self'"]);
    expect(policy.get('connect-src')).toEqual(["'self'"]);
  });

  it('[E 14] comes without HSTS over http', () => {
    expect(page().headers.has('strict-transport-security')).toBe(false);
  });

  it('is made for pages, and keeps away from uploads, whose bodies it would cut', () => {
    const [pattern = ''] = config.matcher;
    const matches = (path: string) => new RegExp(`^${pattern}$`).test(path);
    expect(['/', '/sites/a', '/verify/x', '/nothing-here'].map(matches)).toEqual([true, true, true, true]);
    expect(['/api/v1/sites/a/uploads', '/api/v1/session', '/_next/static/a.js'].map(matches)).toEqual([
      false,
      false,
      false,
    ]);
  });
});

describe('the headers of every answer', () => {
  const listed = async () => (await nextConfig.headers?.()) ?? [];
  const value = (headers: { key: string; value: string }[], key: string) =>
    headers.find((one) => one.key === key)?.value;

  it('[E 28] guess no types, tell little about where one came from, and open no devices', async () => {
    const [everywhere] = await listed();
    expect(everywhere?.source).toBe('/:path*');
    const headers = everywhere?.headers ?? [];
    expect(value(headers, 'X-Content-Type-Options')).toBe('nosniff');
    expect(value(headers, 'Referrer-Policy')).toBe('strict-origin-when-cross-origin');
    expect(value(headers, 'Cross-Origin-Opener-Policy')).toBe('same-origin');
    expect(value(headers, 'Cross-Origin-Resource-Policy')).toBe('same-origin');
    expect(value(headers, 'Permissions-Policy')).toMatch(/camera=\(\).*microphone=\(\)/);
    expect(nextConfig.poweredByHeader).toBe(false);
  });

  it('[E 69] say nothing at all on pages whose address is a secret', async () => {
    const secret = (await listed()).at(-1);
    for (const door of ['verify', 'reset', 'invitation']) expect(secret?.source).toContain(door);
    expect(secret?.headers).toEqual([{ key: 'Referrer-Policy', value: 'no-referrer' }]);
  });

  it('[E 28] of data refuse to be a page', async () => {
    const response = await getMe(new Request('http://127.0.0.1:3000/api/v1/people/me'), {
      params: Promise.resolve({}),
    });
    expect(response.status).toBe(401);
    expect(response.headers.get('content-type')).toBe('application/problem+json');
    expect(response.headers.get('cache-control')).toBe('no-store');
  });
});
