import { selectOne, reading } from '@/db/work';

/** The drawing number under which a plan issue stands. */
export async function drawingOfPlan(planId: string): Promise<string> {
  const row = await selectOne<{ number: string }>(
    reading(),
    'SELECT d.number FROM plan_issues p JOIN drawing_revisions r ON r.id = p.drawing_revision_id JOIN drawings d ON d.id = r.drawing_id WHERE p.id = ?',
    [planId],
  );
  if (!row) throw new Error('the plan of the setting is not there');
  return row.number;
}
