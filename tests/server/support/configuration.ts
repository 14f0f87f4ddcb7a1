// The database is the one of the run; the rest is made up for it.
process.env.NEXTAUTH_SECRET ??= 'a secret of tests, at least thirty-two characters';
process.env.NEXTAUTH_URL ??= 'http://localhost:3000';
process.env.LOG_LEVEL = 'silent';
