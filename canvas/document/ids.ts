const ALPHABET = '0123456789ABCDEFGHJKMNPQRSTVWXYZabcdefghjkmnpqrstvwxyz';

/**
 * A fresh identifier for a part or a wire. Ten characters of 54 make a clash on one sheet as good as impossible; they
 * need not be secret, since nothing is granted by knowing one.
 */
export function freshId(random: () => number = Math.random): string {
  let id = '';
  for (let index = 0; index < 10; index += 1) id += ALPHABET[Math.floor(random() * ALPHABET.length)] ?? '0';
  return id;
}
