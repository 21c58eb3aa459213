import { existsSync } from 'node:fs';
import { Fault, say } from './progress.mjs';
import { run } from './run-script.mjs';

/** A program (or file) that shows whether the Debian package which brings it is there. */
const needed = {
  running: {
    'mariadb-server-core': '/usr/sbin/mariadbd',
    'mariadb-client-core': '/usr/bin/mariadb',
  },
  testing: {
    chromium: '/usr/bin/chromium',
    'poppler-utils': '/usr/bin/pdfsig',
    qpdf: '/usr/bin/qpdf',
    'zbar-tools': '/usr/bin/zbarimg',
    dcmtk: '/usr/bin/dcmdump',
    'python3-pydicom': '/usr/lib/python3/dist-packages/pydicom',
    'mupdf-tools': '/usr/bin/mutool',
    'libnss3-tools': '/usr/bin/certutil',
    openssl: '/usr/bin/openssl',
  },
};

/** Debian packages of the given purposes ('running', 'testing') that are missing here. */
export function missingDebian(purposes) {
  return purposes.flatMap((purpose) =>
    Object.entries(needed[purpose])
      .filter(([, file]) => !existsSync(file))
      .map(([name]) => name),
  );
}

/** Installs missing Debian packages. Throws a Fault with the command to type when this is not root or no Debian. */
export async function installDebian(purposes) {
  const missing = missingDebian(purposes);
  if (missing.length === 0) return;
  const command = `apt-get update && apt-get install -y --no-install-recommends ${missing.join(' ')}`;
  if (process.getuid() !== 0)
    throw new Fault(`Missing Debian packages: ${missing.join(', ')}.\nInstall them as root: ${command}`);
  if (!existsSync('/usr/bin/apt-get'))
    throw new Fault(
      `Missing programs of these Debian packages: ${missing.join(', ')}; there is no apt-get here to install them.`,
    );
  say(`  installing from Debian: ${missing.join(' ')}`);
  const environment = { DEBIAN_FRONTEND: 'noninteractive' };
  const lists = await run('apt-get', ['update', '-q'], { environment });
  const installed = await run('apt-get', ['install', '-y', '-q', '--no-install-recommends', ...missing], { environment });
  if (installed.code !== 0) {
    throw new Fault(
      `apt-get could not install ${missing.join(' ')}:\n${lists.code === 0 ? '' : lists.output}${installed.output.slice(-3000)}`,
    );
  }
}
