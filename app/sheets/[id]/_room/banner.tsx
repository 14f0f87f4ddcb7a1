import { Info, TriangleAlert } from 'lucide-react';
import type { ReactNode } from 'react';
import { classNames } from '@/components/class-names';

export type BannerWords = {
  readonly tone: 'plain' | 'caution';
  readonly text: ReactNode;
  /** Buttons, the one to press last. */
  readonly actions?: ReactNode;
};

/** What the whole sheet must say, between the masthead and the drawing. The frame is there before its words, to be spoken. */
export function Banner({ words }: { readonly words: BannerWords | null }) {
  return (
    <div role="status">
      {words !== null && (
        <div
          className={classNames(
            'flex flex-wrap items-center gap-x-3 gap-y-1.5 border-b border-rule px-4 py-1.5 text-[13px]',
            words.tone === 'caution' ? 'bg-caution/10' : 'bg-sunken',
          )}
        >
          {words.tone === 'caution' ? (
            <TriangleAlert size={16} strokeWidth={1.75} aria-hidden="true" className="shrink-0 text-caution" />
          ) : (
            <Info size={16} strokeWidth={1.75} aria-hidden="true" className="shrink-0 text-muted" />
          )}
          <p className="min-w-60 flex-1 leading-snug text-pretty">{words.text}</p>
          {words.actions !== undefined && <span className="flex flex-wrap gap-1.5 print:hidden">{words.actions}</span>}
        </div>
      )}
    </div>
  );
}
