import { INK, type MarkerShape } from './palette';

interface MarkProps {
  readonly x: number;
  readonly y: number;
  readonly colour: string;
  readonly shape: MarkerShape;
  readonly size?: number;
}

/** One measured value. Shapes stay apart without colour. */
export function Mark({ x, y, colour, shape, size = 5 }: MarkProps) {
  const edge = { stroke: INK.chalk, strokeWidth: 1.5 };
  switch (shape) {
    case 'circle':
      return <circle cx={x} cy={y} r={size} fill={colour} {...edge} />;
    case 'square':
      return <rect x={x - size} y={y - size} width={size * 2} height={size * 2} fill={colour} {...edge} />;
    case 'triangle':
      return <path d={`M${x} ${y - size - 1}l${size + 1} ${size * 2}h${-2 * (size + 1)}z`} fill={colour} {...edge} />;
    case 'diamond':
      return (
        <path
          d={`M${x} ${y - size - 1.5}l${size + 1.5} ${size + 1.5}l${-size - 1.5} ${size + 1.5}l${-size - 1.5} ${-size - 1.5}z`}
          fill={colour}
          {...edge}
        />
      );
    case 'cross':
      return (
        <path
          d={`M${x - size} ${y - size}l${size * 2} ${size * 2}M${x + size} ${y - size}l${-size * 2} ${size * 2}`}
          stroke={colour}
          strokeWidth={2.5}
          fill="none"
        />
      );
    case 'ring':
      return <circle cx={x} cy={y} r={size} fill={INK.chalk} stroke={colour} strokeWidth={2} />;
  }
}

/** A result beyond what the laboratory can read: hollow, standing at the limit, pointing to where the value may be. */
export function LimitMark({ x, y, colour, side }: { x: number; y: number; colour: string; side: 'below' | 'above' }) {
  const way = side === 'below' ? 1 : -1;
  return <path d={`M${x - 6} ${y - way * 4}h12l-6 ${way * 10}z`} fill={INK.chalk} stroke={colour} strokeWidth={2} />;
}
