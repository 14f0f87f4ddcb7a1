'use client';

import { ChevronDown, TriangleAlert, X } from 'lucide-react';
import { memo, useEffect, useId, useRef } from 'react';
import { classNames } from '@/components/class-names';
import { LiveRegion } from '@/components/live-region';
import { CAUTION_ADVICE, type Caution } from '../../network/cautions';
import type { SheetProblem } from '../../network/readings';
import { useCommands } from '../screen-context';
import { useSheet, useSheetStore } from '../sheet-context';
import { setFolded, useFolded } from './fold-store';
import { plural } from './several-panel';
import { showOnDrawing } from './show-on-drawing';

const CAUTIONS = 'cautions';

/** What needs attention, above everything else: why there is no solution, and where the work can hurt someone. */
export function Attention() {
  const problems = useSheet((state) => state.readings.problems);
  const cautions = useSheet((state) => state.readings.cautions);
  const asked = useSheet((state) => state.panel === 'problems');
  const store = useSheetStore();
  const ref = useRef<HTMLDivElement>(null);

  // Asked for from the status line or the command list: it comes into view and takes the focus.
  useEffect(() => {
    if (!asked) return;
    setFolded(CAUTIONS, false);
    ref.current?.scrollIntoView({ block: 'nearest' });
    ref.current?.querySelector('button')?.focus({ preventScroll: true });
    store.getState().setPanel(null);
  }, [asked, store]);

  return (
    <div ref={ref}>
      <LiveRegion>{problems.map(({ message }) => message).join(' ')}</LiveRegion>
      {problems.length > 0 && <Problems problems={problems} />}
      {cautions.length > 0 && <Cautions cautions={cautions} />}
    </div>
  );
}

const Problems = memo(function Problems({ problems }: { readonly problems: readonly SheetProblem[] }) {
  const commands = useCommands();
  return (
    <section aria-label="Problems" className="border-b border-rule bg-falls/6 py-2.5 pr-2.5 pl-4">
      <h2 className="mb-0.5 text-sm font-semibold text-falls">{plural(problems.length, 'problem')}</h2>
      <ul className="max-h-72 overflow-y-auto">
        {problems.map((problem) => {
          const pressable = problem.parts.length + problem.pins.length + problem.wires.length > 0;
          return (
            <li key={problem.message}>
              {pressable ? (
                <button
                  type="button"
                  title="Show it on the drawing"
                  onClick={() => showOnDrawing(commands.context(), problem)}
                  className="-mx-1.5 flex w-[calc(100%+12px)] cursor-pointer rounded-[5px] px-1.5 py-1 text-left hover:bg-falls/8"
                >
                  <ProblemText problem={problem} />
                </button>
              ) : (
                <div className="flex py-1">
                  <ProblemText problem={problem} />
                </div>
              )}
            </li>
          );
        })}
      </ul>
    </section>
  );
});

function ProblemText({ problem }: { readonly problem: SheetProblem }) {
  return (
    <span className="flex gap-2 text-[13px] leading-[18px] text-ink">
      <X size={15} strokeWidth={2} aria-hidden="true" className="mt-px shrink-0 text-falls" />
      {problem.message}
    </span>
  );
}

/** They fold, but stay announced by the heading, and a print shows them in full whether folded or not. */
const Cautions = memo(function Cautions({ cautions }: { readonly cautions: readonly Caution[] }) {
  const commands = useCommands();
  const folded = useFolded(CAUTIONS);
  const id = useId();
  const sources = [...new Set(cautions.map(({ source }) => source))];
  return (
    <section aria-labelledby={`${id}-title`} className="border-b border-rule bg-caution/8 py-1.5 pr-2.5 pl-4">
      <h2>
        <button
          type="button"
          aria-expanded={!folded}
          aria-controls={`${id}-content`}
          onClick={() => setFolded(CAUTIONS, !folded)}
          className="flex h-8 w-full cursor-pointer items-center gap-2 rounded-[5px] text-left text-caution"
        >
          <TriangleAlert size={16} strokeWidth={1.75} aria-hidden="true" className="shrink-0" />
          <span id={`${id}-title`} className="flex-1 text-sm font-semibold">
            Take care: {plural(cautions.length, 'caution')}
          </span>
          <ChevronDown
            size={15}
            strokeWidth={1.75}
            aria-hidden="true"
            className={classNames('shrink-0 transition-transform duration-[120ms]', folded && 'rotate-90')}
          />
        </button>
      </h2>
      <div id={`${id}-content`} className={classNames('pb-2', folded && 'hidden print:block')}>
        <div className="max-h-64 overflow-y-auto print:max-h-none print:overflow-visible">
          {sources.map((source) => (
            <div key={source} className="mb-1">
              <ul>
                {cautions
                  .filter((caution) => caution.source === source)
                  .map((caution) => (
                    <li key={caution.message}>
                      <button
                        type="button"
                        title="Show it on the drawing"
                        onClick={() => showOnDrawing(commands.context(), caution)}
                        className="-mx-1.5 w-[calc(100%+12px)] cursor-pointer rounded-[5px] px-1.5 py-[3px] text-left text-[13px] leading-[18px] text-ink hover:bg-caution/10"
                      >
                        {caution.message}
                      </button>
                    </li>
                  ))}
              </ul>
              <p className="text-[12px] leading-4 text-muted">Limit: {source}.</p>
            </div>
          ))}
        </div>
        <p className="mt-1.5 text-[12.5px] leading-[17px] text-ink">{CAUTION_ADVICE}</p>
      </div>
    </section>
  );
});
