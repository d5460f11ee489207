import { type RefObject, useLayoutEffect, useRef } from 'react';

/** A ref that always holds the value of the last render, for callbacks that outlive it. */
export function useLatest<T>(value: T): RefObject<T> {
  const ref = useRef(value);
  useLayoutEffect(() => {
    ref.current = value;
  });
  return ref;
}
