/** What the sign-in handler says by `error`; everything else means that the address or the password is wrong. */
export const SIGN_IN_ERRORS = {
  tooMany: 'tooMany',
  noTeam: 'noTeam',
  unavailable: 'unavailable',
  unexpected: 'unexpected',
} as const;

/**
 * The sentence for a sign-in that was refused. Takes next-auth's `error` as it came, even out of the page's address,
 * and says nothing of it that is not in this list.
 * @param now for tests
 */
export function signInErrorText(error: string, now = new Date()): string {
  if (error.startsWith(`${SIGN_IN_ERRORS.tooMany}:`)) {
    const again = Date.parse(error.slice(SIGN_IN_ERRORS.tooMany.length + 1));
    const minutes = Math.ceil((again - now.getTime()) / 60_000);
    // A time that is not one, or beyond any window, was not written by the server.
    if (!(minutes >= 0 && minutes <= 60)) return 'That was tried too often. Wait a little, then try again.';
    if (minutes <= 1) return 'That was tried too often. Try again in a minute.';
    return `That was tried too often. Try again in ${minutes} minutes.`;
  }
  switch (error) {
    case SIGN_IN_ERRORS.noTeam:
      return 'This account is in no team any more. Ask an owner of your team to take you in again.';
    case SIGN_IN_ERRORS.unavailable:
      return 'The server cannot reach its database just now. Try again in a moment.';
    case SIGN_IN_ERRORS.unexpected:
      return 'Something went wrong on the server that should not have. Try again in a moment.';
    default:
      return 'The address or the password is not right. Check both and try again.';
  }
}
