import 'server-only';
import type { Permission } from './permissions';

/** What an action or a handler says of itself: its name in the log, and who may come in. */
export type Declaration = {
  readonly kind: 'action' | 'handler';
  readonly name: string;
  readonly permission: Permission | 'public';
};

const declarations = new WeakMap<object, Declaration>();

/** Called by the two wrappers only, so that whatever has a declaration went through one of them. */
export function declare<F extends object>(door: F, declaration: Declaration): F {
  declarations.set(door, declaration);
  return door;
}

/** The declaration of an exported action or handler; undefined means that it went through no wrapper. */
export function declarationOf(door: unknown): Declaration | undefined {
  return typeof door === 'function' ? declarations.get(door) : undefined;
}
