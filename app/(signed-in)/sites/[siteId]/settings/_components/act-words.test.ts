import { readdirSync, readFileSync } from 'node:fs';
import { expect, it } from 'vitest';
import { actInWords } from './act-words';

const WRITTEN_DOWN = /\bact: '([a-z-]+\.[a-z-]+)',?\s*objectKind/g;

it('has words for every act that the verbs write down', () => {
  const acts = readdirSync('lib', { recursive: true, encoding: 'utf8' })
    .filter((file) => file.endsWith('.ts') && !file.endsWith('.test.ts'))
    .flatMap((file) => [...readFileSync(`lib/${file}`, 'utf8').matchAll(WRITTEN_DOWN)].map((match) => match[1] ?? ''));
  expect(acts.length).toBeGreaterThan(30);
  expect(acts.filter((act) => actInWords(act).includes(': '))).toEqual([]);
});
