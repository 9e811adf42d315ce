import fs from 'node:fs';
import path from 'node:path';

const root = path.resolve(import.meta.dirname, '../..');

/** The files of one name under a folder of the application, and the address that each answers at. */
function filesOf(name: string): { address: string; text: string }[] {
  const found = fs.readdirSync(path.join(root, 'app'), { recursive: true, encoding: 'utf8' });
  return found
    .filter((file) => path.basename(file) === name)
    .map((file) => ({ address: `/${path.dirname(file)}`.replace(/^\/\.$/, '/'), text: fs.readFileSync(path.join(root, 'app', file), 'utf8') }));
}

/** The sign-in library’s own addresses: it guards them itself. */
const LIBRARY = '/api/auth/[...nextauth]';

/** Every handler that the application has, as the table of access names it: `PUT /api/studies/[id]`. */
export function handlers(): string[] {
  const METHOD = /^export (?:const|function|async function) (GET|HEAD|POST|PUT|PATCH|DELETE|OPTIONS)\b/gm;
  return filesOf('route.ts')
    .filter(({ address }) => address !== LIBRARY)
    .flatMap(({ address, text }) => {
      const methods = [...text.matchAll(METHOD)].map(([, method]) => `${method} ${address}`);
      return methods.length > 0 ? methods : [`nothing ${address}`];
    })
    .sort();
}

/** Every page that the application has, as its folder names it: `/studies/[id]`. */
export const pages = (): string[] => filesOf('page.tsx').map(({ address }) => address).sort();
