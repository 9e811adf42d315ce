import fs from 'node:fs';
import { data, inRoot, root } from './paths.mjs';
import { Stop } from './stop.mjs';

/** Refuses early where an earlier start under another account has left folders that this one cannot write. */
export function requireWritable() {
  for (const folder of [root, data, inRoot('node_modules'), inRoot('.next')]) {
    if (!fs.existsSync(folder)) continue;
    try {
      fs.accessSync(folder, fs.constants.W_OK);
    } catch {
      throw new Stop(`This account may not write to ${folder}: start Sesqui as the account that owns it, or clone it anew.`);
    }
  }
}
