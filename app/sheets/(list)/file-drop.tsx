'use client';

import { useEffect, useState } from 'react';

export type FileDropProps = { readonly onFiles: (files: readonly File[]) => void };

/** Lets a file be dropped anywhere on the page. The picker does the same for whoever does not drag. */
export function FileDrop({ onFiles }: FileDropProps) {
  const [over, setOver] = useState(false);

  useEffect(() => {
    // Entering a child leaves its parent: only when as many were left as entered has the pointer gone.
    let depth = 0;
    const onEnter = (event: DragEvent): void => {
      if (!carriesFiles(event)) return;
      event.preventDefault();
      depth += 1;
      setOver(true);
    };
    const onOver = (event: DragEvent): void => {
      if (carriesFiles(event)) event.preventDefault();
    };
    const onLeave = (event: DragEvent): void => {
      if (!carriesFiles(event)) return;
      depth -= 1;
      if (depth <= 0) {
        depth = 0;
        setOver(false);
      }
    };
    const onDrop = (event: DragEvent): void => {
      if (!carriesFiles(event)) return;
      // Without this the browser would leave the page and show the file.
      event.preventDefault();
      depth = 0;
      setOver(false);
      const files = [...(event.dataTransfer?.files ?? [])];
      if (files.length > 0) onFiles(files);
    };
    window.addEventListener('dragenter', onEnter);
    window.addEventListener('dragover', onOver);
    window.addEventListener('dragleave', onLeave);
    window.addEventListener('drop', onDrop);
    return () => {
      window.removeEventListener('dragenter', onEnter);
      window.removeEventListener('dragover', onOver);
      window.removeEventListener('dragleave', onLeave);
      window.removeEventListener('drop', onDrop);
    };
  }, [onFiles]);

  if (!over) return null;
  return (
    <div className="fade-in pointer-events-none fixed inset-0 z-40 flex items-center justify-center bg-paper/80 p-6">
      <p className="rounded-xl border-2 border-dashed border-voltage bg-raised px-8 py-6 text-[17px] font-semibold text-voltage shadow-float">
        Drop the sheet file to import it
      </p>
    </div>
  );
}

function carriesFiles(event: DragEvent): boolean {
  return event.dataTransfer?.types.includes('Files') ?? false;
}
