import { execFileSync, spawnSync } from 'node:child_process';
import fs from 'node:fs';
import os from 'node:os';
import path from 'node:path';

const SCHEMA = path.resolve(import.meta.dirname, '../../../shared/reference/musicxml-schema');

/** Whether the schema and xmllint (Debian's libxml2-utils) are here. */
export function canValidate(): boolean {
  return fs.existsSync(path.join(SCHEMA, 'musicxml.xsd')) && spawnSync('xmllint', ['--version']).status === 0;
}

/** A copy of the schema whose imports are the files beside it: xmllint would ask the network for them. */
function localSchema(folder: string): string {
  for (const name of fs.readdirSync(SCHEMA).filter((one) => one.endsWith('.xsd'))) {
    fs.writeFileSync(path.join(folder, name), fs.readFileSync(path.join(SCHEMA, name), 'utf8').replaceAll('http://www.musicxml.org/xsd/', ''));
  }
  return path.join(folder, 'musicxml.xsd');
}

/** Validates files by the MusicXML 4.0 schema (W3C, FSA). @returns what xmllint complains of, empty where all are valid */
export function validate(files: ReadonlyMap<string, string>): string {
  const folder = fs.mkdtempSync(path.join(os.tmpdir(), 'sesqui-xml-'));
  try {
    const schema = localSchema(folder);
    const names = [...files].map(([name, text]) => {
      const file = path.join(folder, `${name}.musicxml`);
      fs.writeFileSync(file, text);
      return file;
    });
    try {
      execFileSync('xmllint', ['--noout', '--nonet', '--schema', schema, ...names], { stdio: 'pipe', maxBuffer: 1e8 });
      return '';
    } catch (error) {
      return String((error as { stderr?: Buffer }).stderr).split('\n').filter((line) => !line.endsWith(' validates')).slice(0, 12).join('\n');
    }
  } finally {
    fs.rmSync(folder, { recursive: true, force: true });
  }
}

/** The ids of the standard's list of sounds, where it is here. */
export function standardSounds(): Set<string> | null {
  const file = path.join(SCHEMA, 'sounds.xml');
  return fs.existsSync(file) ? new Set([...fs.readFileSync(file, 'utf8').matchAll(/<sound id="([^"]+)"/g)].map(([, id]) => id!)) : null;
}
