'use client';

import { useEffect, useRef } from 'react';
import { useStoreApi } from 'reactflow';
import type { SheetStore } from '../../store/sheet-store';
import { useSheetStore } from '../sheet-context';
import type { Gestures } from './gestures';
import { layoutOf } from './layout-of';
import { paintReadings, type Ink } from './paint-readings';

/** The canvas that readings are painted on. It paints at most once a frame, whatever has changed. */
export function ReadingOverlay({ gestures }: { gestures: Gestures }) {
  const canvas = useRef<HTMLCanvasElement>(null);
  const flow = useStoreApi();
  const store = useSheetStore();

  useEffect(() => {
    const element = canvas.current;
    const context = element?.getContext('2d');
    if (!element || !context) return;
    let ink = readInk(element);
    let frame = 0;
    const paint = () => {
      frame = 0;
      const { transform, width, height } = flow.getState();
      fit(element, width, height);
      const ratio = element.width / Math.max(1, width);
      context.setTransform(ratio, 0, 0, ratio, 0, 0);
      context.clearRect(0, 0, width, height);
      paintReadings(context, sceneOf(store, gestures), { x: transform[0], y: transform[1], zoom: transform[2] }, ink);
    };
    const ask = () => {
      if (frame === 0) frame = requestAnimationFrame(paint);
    };
    const reread = () => {
      ink = readInk(element);
      ask();
    };
    const scheme = matchMedia('(prefers-color-scheme: dark)');
    const themes = new MutationObserver(reread);
    themes.observe(document.documentElement, { attributes: true, attributeFilter: ['data-theme', 'class'] });
    scheme.addEventListener('change', reread);
    // A print is taken at once, without another frame.
    const onPrint = () => {
      ink = readInk(element);
      paint();
    };
    window.addEventListener('beforeprint', onPrint);
    window.addEventListener('afterprint', reread);
    void document.fonts.ready.then(reread);
    let size = '';
    const stops = [
      flow.subscribe(({ transform, width, height }) => {
        const next = `${transform.join(' ')} ${width} ${height}`;
        if (next === size) return;
        size = next;
        ask();
      }),
      store.subscribe((now, before) => {
        if (now.document !== before.document || now.readings !== before.readings || now.showing !== before.showing) ask();
      }),
      gestures.onCarry(ask),
    ];
    ask();
    return () => {
      cancelAnimationFrame(frame);
      themes.disconnect();
      scheme.removeEventListener('change', reread);
      window.removeEventListener('beforeprint', onPrint);
      window.removeEventListener('afterprint', reread);
      for (const stop of stops) stop();
    };
  }, [flow, store, gestures]);

  return <canvas ref={canvas} className="pointer-events-none absolute inset-0 z-[5] h-full w-full" aria-hidden="true" />;
}

function sceneOf(store: SheetStore, gestures: Gestures) {
  const { document, readings, showing } = store.getState();
  return { document, readings, showing, layout: layoutOf(store.getState()), carried: gestures.carried() };
}

function fit(element: HTMLCanvasElement, width: number, height: number): void {
  const ratio = window.devicePixelRatio || 1;
  const [w, h] = [Math.round(width * ratio), Math.round(height * ratio)];
  if (element.width !== w) element.width = w;
  if (element.height !== h) element.height = h;
}

function readInk(element: HTMLElement): Ink {
  const style = getComputedStyle(element);
  const token = (name: string) => style.getPropertyValue(name).trim();
  return {
    voltage: token('--voltage'),
    current: token('--current'),
    power: token('--power'),
    ink: token('--ink'),
    raised: token('--raised'),
    rule: token('--rule'),
    muted: token('--muted'),
    figures: familyOf('font-mono', element),
    words: familyOf('font-sans', element),
  };
}

/** The family that a utility class gives, as the canvas wants it spelt. */
function familyOf(className: string, near: HTMLElement): string {
  const probe = document.createElement('span');
  probe.className = className;
  near.parentElement?.append(probe);
  const family = getComputedStyle(probe).fontFamily;
  probe.remove();
  return family;
}
