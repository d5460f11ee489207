import { readFileSync } from 'node:fs';

/** Runs one command to its end among `children` (so that Ctrl-C ends it too); a failure throws with the end of its output. */
export function createRunner({ children, root }) {
  return async function run(name, command, args, { env = process.env, lines = 60, inherit = false } = {}) {
    const entry = children.start(name, command, args, { env, cwd: root, inherit });
    entry.expected = true;
    const { code, signal } = await entry.ended;
    if (code === 0) return;
    const output = readFileSync(entry.logFile, 'utf8').trimEnd().split('\n').slice(-lines).join('\n');
    throw new Error(`${name} failed (${signal ?? code}), see ${entry.logFile}:\n${output}`);
  };
}
