// Takes every mail the product sends and keeps it as a file, with one line for each in index.jsonl.
import { appendFileSync, createWriteStream, mkdirSync, readdirSync } from 'node:fs';
import { pipeline } from 'node:stream/promises';
import path from 'node:path';
import { SMTPServer } from 'smtp-server';

const [folder, port] = process.argv.slice(2);
mkdirSync(folder, { recursive: true });
let count = readdirSync(folder).filter((file) => file.endsWith('.eml')).length;

async function keep(stream, session) {
  count += 1;
  const file = `${String(count).padStart(5, '0')}.eml`;
  await pipeline(stream, createWriteStream(path.join(folder, file)));
  const { mailFrom, rcptTo } = session.envelope;
  const line = {
    file,
    receivedAt: new Date().toISOString(),
    from: mailFrom ? mailFrom.address : '',
    to: rcptTo.map(({ address }) => address),
  };
  appendFileSync(path.join(folder, 'index.jsonl'), `${JSON.stringify(line)}\n`);
}

const server = new SMTPServer({
  authOptional: true,
  disabledCommands: ['STARTTLS', 'AUTH'],
  onData(stream, session, done) {
    keep(stream, session).then(
      () => done(),
      (error) => done(error),
    );
  },
});
server.on('error', (error) => console.error(error.message));
server.listen(Number(port), '127.0.0.1');
process.once('SIGTERM', () => server.close(() => process.exit(0)));
