'use client';

import { useState, useRef, type KeyboardEvent, type Ref } from 'react';
import { Popover } from 'radix-ui';
import { classNames } from '@/components/class-names';
import { frequencyText, setOperatingFrequency } from '../../commands/looking-commands';
import { formatAngular, formatHertz } from '../figures/echo';
import { useCommands } from '../screen-context';
import { useSheet, useSheetStore } from '../sheet-context';
import { handlePlace, percentOf } from './axis';
import { FrequencyEntry } from './frequency-entry';
import { frequencyAfterKey } from './step-frequency';

export type FrequencyHandleProps = {
  /** Puts back a drag under way; whether there was one. */
  readonly onCancel: () => boolean;
  readonly ref: Ref<HTMLDivElement>;
};

/** Past this share of the axis there is no room for ω at the flag's right. */
const ROOM_AT_RIGHT = 0.85;

/** The handle of the Band: a flag with the operating frequency, a line down to the axis. Also a slider for the keyboard. */
export function FrequencyHandle({ onCancel, ref }: FrequencyHandleProps) {
  const store = useSheetStore();
  const commands = useCommands();
  const band = useSheet((state) => state.document.band);
  const hz = useSheet((state) => state.readings.frequencyHz);
  const [typing, setTyping] = useState(false);
  const flag = useRef<HTMLDivElement>(null);
  const presses = useRef(0);
  const { share, parked } = handlePlace(band, hz);

  const onKeyDown = (event: KeyboardEvent<HTMLDivElement>) => {
    if (event.target !== event.currentTarget || event.ctrlKey || event.metaKey || event.altKey) return;
    if (event.key === 'Escape') {
      if (onCancel()) event.stopPropagation();
      return;
    }
    if (event.key === 'Enter') {
      event.preventDefault();
      event.stopPropagation();
      setTyping(true);
      return;
    }
    const next = frequencyAfterKey(band, hz, event);
    if (next === null) return;
    event.preventDefault();
    event.stopPropagation();
    const context = commands.context();
    setOperatingFrequency(context, frequencyText(next, context.document.operatingFrequency), `frequency slider ${presses.current}`);
  };

  // Keys that are held down are one step for undo, as a drag is.
  const onKeysEnd = () => {
    presses.current += 1;
    store.getState().endGesture();
  };

  const direct = hz === 0;
  return (
    <Popover.Root open={typing} onOpenChange={setTyping}>
      <div className="pointer-events-none absolute inset-y-0 z-10 w-0" style={{ left: percentOf(share) }}>
        <div
          aria-hidden="true"
          className={classNames('absolute top-[26px] bottom-[22px] -left-px w-0.5 bg-ink', parked !== null && 'opacity-35')}
        />
        {parked === null && <div aria-hidden="true" className="absolute bottom-[18px] -left-1 size-2 rounded-full bg-ink" />}
        <Popover.Anchor asChild>
          <div
            ref={(element) => {
              flag.current = element;
              if (typeof ref === 'function') ref(element);
              else if (ref) ref.current = element;
            }}
            role="slider"
            tabIndex={0}
            aria-label="Operating frequency"
            aria-orientation="horizontal"
            aria-valuemin={band.fromHz}
            aria-valuemax={band.toHz}
            aria-valuenow={Math.min(band.toHz, Math.max(band.fromHz, hz))}
            aria-valuetext={direct ? '0 Hz, direct current' : `${formatHertz(hz)}, ω ${formatAngular(hz)}`}
            data-frequency-handle=""
            title="Drag, or press Enter to type a value"
            onKeyDown={onKeyDown}
            onKeyUp={onKeysEnd}
            onBlur={onKeysEnd}
            onDoubleClick={() => setTyping(true)}
            className={classNames(
              'pointer-events-auto absolute top-0 left-0 flex h-6 min-w-[84px] -translate-x-1/2 cursor-ew-resize touch-none items-center justify-center gap-1 rounded-md bg-ink px-2',
              'font-mono text-[12.5px] leading-none font-medium whitespace-nowrap text-paper tabular-nums select-none',
            )}
          >
            {parked === 'below' && <Arrow points="left" />}
            {formatHertz(hz)}
            {parked === 'above' && <Arrow points="right" />}
            {parked === null && (
              <svg aria-hidden="true" viewBox="0 0 10 5" className="absolute top-full left-1/2 -mt-px h-[5px] w-2.5 -translate-x-1/2 text-ink">
                <path d="M0 0H10L5 5Z" fill="currentColor" />
              </svg>
            )}
          </div>
        </Popover.Anchor>
        <span
          aria-hidden="true"
          className={classNames(
            'absolute top-0 flex h-6 items-center text-[12px] whitespace-nowrap text-muted tabular-nums',
            share > ROOM_AT_RIGHT ? 'right-[52px]' : 'left-[52px]',
          )}
        >
          {direct ? (
            'direct current'
          ) : (
            <>
              <i>ω</i>&nbsp;{formatAngular(hz)}
            </>
          )}
        </span>
      </div>
      <Popover.Portal>
        <Popover.Content
          side="top"
          sideOffset={8}
          collisionPadding={8}
          aria-label="Operating frequency"
          onCloseAutoFocus={(event) => {
            event.preventDefault();
            flag.current?.focus({ preventScroll: true });
          }}
          onKeyDown={(event) => event.stopPropagation()}
          className="fade-in z-50 w-72 rounded-lg border border-rule bg-raised p-3 text-ink shadow-float"
        >
          <FrequencyEntry onDone={() => setTyping(false)} />
        </Popover.Content>
      </Popover.Portal>
    </Popover.Root>
  );
}

function Arrow({ points }: { readonly points: 'left' | 'right' }) {
  return (
    <svg aria-hidden="true" viewBox="0 0 6 10" className={classNames('h-2.5 w-1.5', points === 'right' && 'rotate-180')}>
      <path d="M6 0V10L0 5Z" fill="currentColor" />
    </svg>
  );
}
