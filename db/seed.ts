import { closeDatabase } from './connection';
import { seedDemo } from './seeds/demo';

// The demo's passwords are printed for everybody: they must never open a plant's own data.
if (process.env.RINGTRUE_DEMO !== '1') {
  console.error('Demo data is refused: it is made only where RINGTRUE_DEMO=1 is set, never on a plant’s own data.');
  process.exit(1);
}

try {
  const made = await seedDemo();
  console.log(made ? 'demo data is made' : 'demo data is already there');
} finally {
  await closeDatabase();
}
