import { bodyOf, courseOf, extentOf } from '@/canvas/document/lookup';
import type { SheetDocument } from '@/canvas/document/types';
import { grow, unite } from '@/canvas/geometry/box';
import { pathOf } from '@/canvas/geometry/route';
import { Symbol } from '@/canvas/react/drawing/symbol';

/** A drawing as a small still picture, whole. */
export function SheetPicture({ document, label }: { readonly document: SheetDocument; readonly label: string }) {
  const box = unite(document.parts.map(extentOf));
  if (box === null) {
    return (
      <div role="img" aria-label={`${label}: empty`} className="grid h-full place-items-center text-[13px] text-muted">
        Nothing drawn
      </div>
    );
  }
  const { left, top, right, bottom } = grow(box, 30);
  return (
    <svg
      role="img"
      aria-label={label}
      viewBox={`${left} ${top} ${right - left} ${bottom - top}`}
      preserveAspectRatio="xMidYMid meet"
      className="size-full text-ink"
    >
      {document.wires.map((wire) => (
        <path key={wire.id} d={pathOf(courseOf(document, wire))} fill="none" stroke="currentColor" strokeWidth="1.75" />
      ))}
      {document.parts.map((part) => {
        const body = bodyOf(part);
        return (
          <g key={part.id}>
            <g transform={`translate(${part.at.x} ${part.at.y})`}>
              <Symbol kind={part.kind} placement={part} />
            </g>
            {part.designator !== '' && (
              <text x={body.right + 4} y={body.top - 4} className="fill-muted text-[14px]">
                {part.designator}
              </text>
            )}
          </g>
        );
      })}
    </svg>
  );
}
