'use client';

import { Check, TriangleAlert, X } from 'lucide-react';
import type { ReactNode } from 'react';
import { classNames } from '@/components/class-names';
import { partsById } from '../../document/lookup';
import { conventionAt } from '../../network/format-reading';
import { conventionSentence } from '../figures/convention-words';
import { formatAngular, formatHertz } from '../figures/echo';
import { useSheet, useSheetStore } from '../sheet-context';
import { plural } from './several-panel';

/** What has to be known to read the drawing's figures, at its lower left: convention, balance, what is dead, cautions. */
export function StatusLine() {
  return (
    <ul aria-label="How to read the figures" className="flex flex-wrap items-center gap-2 text-[13px]">
      <ConventionChip />
      <BalanceChip />
      <DeadSources />
      <CautionChip />
    </ul>
  );
}

type ChipTone = 'plain' | 'falls' | 'caution';

const tones: Readonly<Record<ChipTone, string>> = {
  plain: 'border-rule text-muted',
  falls: 'border-falls/60 text-falls',
  caution: 'border-caution/60 text-caution',
};

const chip = 'inline-flex min-h-7 items-center gap-2 rounded-md border bg-raised px-3 py-0.5 tabular-nums';

function Chip({ tone = 'plain', children }: { readonly tone?: ChipTone; readonly children: ReactNode }) {
  return <li className={classNames(chip, tones[tone])}>{children}</li>;
}

/** A chip that brings the Ledger's explanation into view. */
function PressedChip({ tone, children }: { readonly tone: ChipTone; readonly children: ReactNode }) {
  const store = useSheetStore();
  return (
    <li>
      <button
        type="button"
        onClick={() => store.getState().setPanel('problems')}
        className={classNames(chip, tones[tone], 'pointer-events-auto cursor-pointer text-left hover:bg-sunken')}
      >
        {children}
      </button>
    </li>
  );
}

function ConventionChip() {
  const frequencyHz = useSheet((state) => state.readings.frequencyHz);
  const convention = useSheet((state) => state.document.convention);
  return (
    <Chip>
      <span>
        {conventionSentence(conventionAt(convention, frequencyHz))} · <i>f</i>
        <span className="ml-1.5 text-ink">{formatHertz(frequencyHz)}</span> · <i>ω</i>
        <span className="ml-1 text-ink">{formatAngular(frequencyHz)}</span>
      </span>
    </Chip>
  );
}

function BalanceChip() {
  const balance = useSheet((state) => state.readings.balance);
  const problems = useSheet((state) => state.readings.problems.length);
  const isEmpty = useSheet((state) => state.readings.network.list.elements.length === 0 && state.readings.problems.length === 0);
  if (isEmpty) return null;
  if (balance === null || (problems > 0 && balance.holds)) {
    return (
      <PressedChip tone="falls">
        <Mark holds={false} />
        {balance === null ? 'No readings' : 'Some readings only'}: {plural(problems, 'problem')}
      </PressedChip>
    );
  }
  if (!balance.holds) {
    return (
      <PressedChip tone="falls">
        <Mark holds={false} />
        Power does not balance: {powerOfTen(balance.ratio)} of it is left over
      </PressedChip>
    );
  }
  return (
    <Chip>
      <Mark holds />
      {balance.ratio === 0 ? 'Power balances exactly' : `Power balances to ${powerOfTen(balance.ratio)}`}
    </Chip>
  );
}

function Mark({ holds }: { readonly holds: boolean }) {
  const Icon = holds ? Check : X;
  return <Icon size={15} strokeWidth={2} aria-hidden="true" className={holds ? 'text-holds' : 'text-falls'} />;
}

const SUPERSCRIPTS = '⁰¹²³⁴⁵⁶⁷⁸⁹';

/** A small ratio in one digit: `2·10⁻¹⁶`. */
export function powerOfTen(ratio: number): string {
  const [digit = '', exponent = ''] = ratio.toExponential(0).split('e');
  const raised = [...exponent].map((sign) => (sign === '-' ? '⁻' : (SUPERSCRIPTS[Number(sign)] ?? ''))).join('');
  return `${digit}·10${exponent.startsWith('+') ? raised.slice(1) : raised}`;
}

function DeadSources() {
  const dead = useSheet((state) => state.readings.deadSources);
  const network = useSheet((state) => state.readings.network);
  const byId = useSheet((state) => partsById(state.document));
  const frequencyHz = useSheet((state) => state.readings.frequencyHz);
  if (dead.length === 0) return null;
  const words = dead.flatMap((id) => {
    const part = byId.get(id);
    const element = network.elementOfPart.get(id);
    if (!part || !element || !('value' in element) || element.value.frequency === null) return [];
    return [`${part.designator} (${formatHertz(element.value.frequency)})`];
  });
  const named = words.length > 3 ? `${words.slice(0, 2).join(', ')} and ${words.length - 2} more` : words.join(', ');
  return (
    <Chip tone="caution">
      <TriangleAlert size={15} strokeWidth={1.75} aria-hidden="true" />
      {named} {words.length === 1 ? 'is' : 'are'} dead at {formatHertz(frequencyHz)}
    </Chip>
  );
}

function CautionChip() {
  const cautions = useSheet((state) => state.readings.cautions.length);
  if (cautions === 0) return null;
  return (
    <PressedChip tone="caution">
      <TriangleAlert size={15} strokeWidth={1.75} aria-hidden="true" />
      Take care: {plural(cautions, 'caution')}
    </PressedChip>
  );
}
