'use client';

import type { ReactNode } from 'react';

export type EmptyShape = 'chart' | 'table' | 'plan' | 'list' | 'page';

type EmptyStateProps = { shape: EmptyShape; title: string; children?: ReactNode; action?: ReactNode };

const edge = { stroke: '#85776A', strokeWidth: 1.6, strokeDasharray: '4 4', fill: 'none' } as const;
const rule = { stroke: '#B9A68F', strokeWidth: 5, strokeLinecap: 'round' } as const;

/** Pencil outlines of what will stand here. */
const outlines: Record<EmptyShape, ReactNode> = {
  chart: (
    <>
      <rect x="20" y="34" width="212" height="30" fill="#DDE9EC" />
      <path d="M20 34h212M20 64h212" stroke="#1D4E63" strokeDasharray="2 5" />
      <path d="M20 118h212M20 12v106" {...edge} />
      <path d="M32 92c30 0 40-12 70-18s44 14 70-8 34-14 44-16" {...edge} strokeWidth={2.4} />
      <circle cx="32" cy="92" r="5" fill="#FBF7F0" stroke="#85776A" strokeWidth="1.6" />
      <circle cx="102" cy="74" r="5" fill="#FBF7F0" stroke="#85776A" strokeWidth="1.6" />
      <circle cx="216" cy="50" r="5" fill="#FBF7F0" stroke="#85776A" strokeWidth="1.6" />
    </>
  ),
  table: (
    <>
      <path d="M14 26h224M14 54h224M14 82h224M14 110h224" {...edge} />
      <path d="M18 40h62M18 68h48M18 96h70" {...rule} />
      <path d="M128 40h26M128 68h20M128 96h26M196 40h30M196 68h22M196 96h30" {...rule} />
    </>
  ),
  plan: (
    <>
      <path d="M16 16h92v48H16zM126 16h108v30H126zM126 64h50v52h-50zM194 64h40v52h-40z" {...edge} />
      <path d="M16 84h92v32H16z" {...edge} />
      <path d="M30 34h36M140 30h30M30 99h28" {...rule} />
    </>
  ),
  list: (
    <>
      <path d="M30 14v108" {...edge} />
      {[24, 62, 100].map((y) => (
        <g key={y}>
          <circle cx="30" cy={y} r="6" fill="#FBF7F0" stroke="#85776A" strokeWidth="1.6" />
          <path d={`M54 ${y - 4}h62`} {...rule} />
          <path d={`M54 ${y + 9}h128`} stroke="#D9CDBB" strokeWidth="4" strokeLinecap="round" />
        </g>
      ))}
    </>
  ),
  page: (
    <>
      <path d="M52 10h68l18 18v92H52z" {...edge} />
      <path d="M66 42h40M66 58h56M66 74h50M66 90h56" {...rule} />
      <path d="M152 70h26" stroke="#1D4E63" strokeWidth="2" />
      <path d="M174 64l8 6-8 6" stroke="#1D4E63" strokeWidth="2" fill="none" />
      <path d="M192 42h42M192 70h42M192 98h42" {...edge} />
    </>
  ),
};

export function EmptyState({ shape, title, children, action }: EmptyStateProps) {
  return (
    <div className="flex flex-wrap items-center gap-x-8 gap-y-4 py-4">
      <svg viewBox="12 6 232 122" className="w-48 max-w-full flex-none" aria-hidden="true" focusable="false">
        {outlines[shape]}
      </svg>
      <div className="min-w-0 flex-1 basis-52">
        <h3 className="text-lg">{title}</h3>
        {children ? <div className="mt-1 max-w-measure text-clay">{children}</div> : null}
        {action ? <div className="mt-4 flex flex-wrap gap-3">{action}</div> : null}
      </div>
    </div>
  );
}
