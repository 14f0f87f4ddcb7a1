import { orient, type Placement } from '../../geometry/placement';
import { definitionOf, type PartKind } from '../../parts/registry';

/** A part's symbol about its own place: strokes turned and mirrored, marks kept upright. */
export function Symbol({ kind, placement }: { kind: PartKind; placement: Pick<Placement, 'turn' | 'mirrored'> }) {
  const { strokes, marks = [] } = definitionOf(kind);
  return (
    <>
      <g transform={`rotate(${placement.turn})${placement.mirrored ? ' scale(-1 1)' : ''}`}>
        {strokes.map(({ d, style = 'line' }) => (
          <path
            key={d}
            d={d}
            fill={style === 'dot' ? 'currentColor' : 'none'}
            stroke="currentColor"
            strokeWidth={style === 'line' ? 1.75 : 1.25}
            strokeLinejoin="round"
            strokeLinecap="round"
          />
        ))}
      </g>
      {marks.map(({ text, at }) => {
        const { x, y } = orient(placement, at);
        return (
          <text key={text} x={x} y={y} dy="0.35em" textAnchor="middle" className="fill-muted text-[12px]">
            {text}
          </text>
        );
      })}
    </>
  );
}
