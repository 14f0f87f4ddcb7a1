import { publicRoute } from '@/app/_server/route';
import { databaseAnswers } from '@/db/queries/health';

/** Whether the server can do its work: for whoever starts it, and for a load balancer. */
export const GET = publicRoute({ name: 'health' }, async () => {
  const answers = await databaseAnswers();
  return Response.json(
    answers
      ? { status: 'ok', database: 'answers' }
      : { status: 'failing', database: 'The database does not answer. Sheets cannot be opened or saved until it does.' },
    { status: answers ? 200 : 503, headers: { 'Cache-Control': 'no-store' } },
  );
});
