import { cleanup, configure } from '@testing-library/react';
import { afterEach } from 'vitest';

afterEach(cleanup);

// A busy machine is slow, not wrong: what is waited for is given the time, and comes at once where there is any.
configure({ asyncUtilTimeout: 10_000 });

// jsdom has no layout, and so no observer of it; components only need the constructor.
class SilentResizeObserver implements ResizeObserver {
  observe(): void {}
  unobserve(): void {}
  disconnect(): void {}
}
globalThis.ResizeObserver ??= SilentResizeObserver;

// jsdom knows the dialog element but not its modal showing; here it is open or not, without the top layer.
HTMLDialogElement.prototype.showModal ??= function showModal(this: HTMLDialogElement): void {
  this.setAttribute('open', '');
};
HTMLDialogElement.prototype.close ??= function close(this: HTMLDialogElement): void {
  this.removeAttribute('open');
};
