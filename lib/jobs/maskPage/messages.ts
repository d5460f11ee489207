export type ToMaskChild = { readonly fileName: string; readonly bytes: Uint8Array; readonly page: number };

export type Masked = {
  readonly ok: true;
  readonly picture: Uint8Array;
  readonly stages: string;
  readonly kept: number;
  readonly masked: number;
};
export type NotMasked = { readonly ok: false; readonly sentence: string };

export type FromMaskChild = { readonly type: 'ready' } | { readonly type: 'done'; readonly answer: Masked | NotMasked };

/** The child is our own program; the check guards against a half-written message of a dying process. */
export function isFromMaskChild(message: unknown): message is FromMaskChild {
  if (typeof message !== 'object' || message === null || !('type' in message)) return false;
  if (message.type === 'ready') return true;
  return (
    message.type === 'done' && 'answer' in message && typeof message.answer === 'object' && message.answer !== null
  );
}
