import { readdirSync, readFileSync } from 'node:fs';
import { expect, it } from 'vitest';

const TAGS = /<svg\b|<StripFrame\b/;

const drawing = ['app', 'lib/ui']
  .flatMap((folder) => readdirSync(folder, { recursive: true, encoding: 'utf8' }).map((file) => `${folder}/${file}`))
  .filter((file) => file.endsWith('.tsx') && !file.endsWith('.test.tsx'))
  .map((file) => ({ file, text: readFileSync(file, 'utf8') }))
  .filter(({ text }) => TAGS.test(text));

it('draws no picture in a server component: a long answer is cut inside it, and React hides the piece with a style attribute', () => {
  expect(drawing.length).toBeGreaterThan(10);
  const cutInPieces = drawing.filter(({ text }) => !text.startsWith("'use client';")).map(({ file }) => file);
  expect(cutInPieces).toEqual([]);
});
