const WORDS: Readonly<Record<string, string>> = {
  mod: 'Ctrl',
  shift: 'Shift',
  alt: 'Alt',
  arrowleft: '←',
  arrowright: '→',
  arrowup: '↑',
  arrowdown: '↓',
  enter: 'Enter',
  escape: 'Esc',
  delete: 'Delete',
  backspace: 'Backspace',
  tab: 'Tab',
};

/** A command's key as printed on a keyboard: `mod+shift+z` is `Ctrl Shift Z`, or with ⌘ on a Mac. */
export function keyWords(key: string, onMac: boolean): string {
  return key
    .split(/\+(?=.)/)
    .map((name) => (name === 'mod' && onMac ? '⌘' : (WORDS[name] ?? name.toUpperCase())))
    .join(' ');
}

export function isMac(): boolean {
  return typeof navigator !== 'undefined' && /mac|iphone|ipad/i.test(navigator.userAgent);
}
