'use client';

import { X } from 'lucide-react';
import { createContext, type ReactNode, useCallback, useContext, useEffect, useMemo, useRef, useState } from 'react';
import { cx } from '../cx';
import { type Tone, toneWord } from './tone';
import { ToneMark } from './tone-mark';

type Message = { id: number; text: string; tone: Tone };
type Announce = (text: string, options?: { tone?: Tone; visible?: boolean }) => void;

const AnnounceContext = createContext<Announce>(() => undefined);

/** Says something to everyone: read aloud through a live region and, unless `visible: false`, shown for a while. */
export function useAnnounce(): Announce {
  return useContext(AnnounceContext);
}

const SHOWN_FOR_MS = 9_000;

export function AnnounceProvider({ children }: { children: ReactNode }) {
  const [spoken, setSpoken] = useState<{ polite: string; now: string; turn: number }>({ polite: '', now: '', turn: 0 });
  const [shown, setShown] = useState<Message[]>([]);

  const announce = useCallback<Announce>((text, { tone = 'info', visible = true } = {}) => {
    const urgent = tone === 'error';
    setSpoken(({ turn }) => ({ polite: urgent ? '' : text, now: urgent ? text : '', turn: turn + 1 }));
    if (visible) setShown((list) => [...list.slice(-2), { id: (list.at(-1)?.id ?? 0) + 1, text, tone }]);
  }, []);
  const dismiss = useCallback((id: number) => setShown((list) => list.filter((m) => m.id !== id)), []);

  const { list, atTop } = useOutOfTheWay();

  // The same sentence twice is two announcements: a no-break space makes the text differ.
  const again = spoken.turn % 2 === 0 ? '' : '\u00a0';
  return (
    <AnnounceContext.Provider value={useMemo(() => announce, [announce])}>
      {children}
      <div className="sr-only" role="status" aria-live="polite" data-testid="announce-polite">
        {spoken.polite && spoken.polite + again}
      </div>
      <div className="sr-only" aria-live="assertive" data-testid="announce-now">
        {spoken.now && spoken.now + again}
      </div>
      <section
        ref={list}
        aria-label="Messages"
        className={cx(
          'no-print pointer-events-none fixed inset-x-3 z-50 grid justify-items-start gap-2 sm:left-6 sm:right-auto',
          atTop ? 'top-3' : 'bottom-[calc(var(--bar-bottom)+0.75rem)]',
        )}
      >
        {shown.map((message) => (
          <Toast key={message.id} message={message} onDismiss={dismiss} />
        ))}
      </section>
    </AnnounceContext.Provider>
  );
}

/** A message that would lie over what has the focus goes to the other end of the window. */
function useOutOfTheWay() {
  const list = useRef<HTMLElement>(null);
  const [atTop, setAtTop] = useState(false);
  useEffect(() => {
    const look = () => {
      const box = list.current?.getBoundingClientRect();
      const at = document.activeElement;
      if (!box || box.height === 0 || !at || at === document.body || list.current?.contains(at)) return;
      const { top, bottom, left, right } = at.getBoundingClientRect();
      const isUnder = top < box.bottom && bottom > box.top && left < box.right && right > box.left;
      // Where it stands is measured, not remembered: two looks in one frame must not send it there and back.
      if (isUnder) setAtTop(box.top > window.innerHeight - box.bottom);
    };
    // The focus scrolls its element into view first.
    const later = () => requestAnimationFrame(look);
    document.addEventListener('focusin', later);
    const watch = new ResizeObserver(look);
    if (list.current) watch.observe(list.current);
    return () => {
      document.removeEventListener('focusin', later);
      watch.disconnect();
    };
  }, []);
  return { list, atTop };
}

function Toast({ message, onDismiss }: { message: Message; onDismiss: (id: number) => void }) {
  const [held, setHeld] = useState(false);
  useEffect(() => {
    // An error stays until it is read and put away.
    if (held || message.tone === 'error') return;
    const timer = setTimeout(() => onDismiss(message.id), SHOWN_FOR_MS);
    return () => clearTimeout(timer);
  }, [held, message, onDismiss]);

  return (
    // biome-ignore lint/a11y/noStaticElementInteractions: resting on the message only keeps it from leaving
    <div
      className="on-peat pointer-events-auto flex w-full max-w-md items-start gap-3 rounded-md bg-peat py-2 pr-2 pl-4 text-chalk shadow-lift"
      onMouseEnter={() => setHeld(true)}
      onMouseLeave={() => setHeld(false)}
      onFocus={() => setHeld(true)}
      onBlur={() => setHeld(false)}
    >
      <ToneMark tone={message.tone} className="mt-2 size-5 flex-none text-lamp" />
      <p className="flex-1 py-1.5">
        <span className="font-bold">{toneWord[message.tone]}. </span>
        {message.text}
      </p>
      <button
        type="button"
        className="grid size-(--target) flex-none place-items-center rounded-sm hover:bg-humus"
        aria-label="Put this message away"
        onClick={() => onDismiss(message.id)}
      >
        <X aria-hidden className="size-5" />
      </button>
    </div>
  );
}
