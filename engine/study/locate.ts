import { EngineError } from '../errors';

/** Runs `work`; an error of the engine that does not say yet where it belongs is given its place in the document. */
export function locate<T>(where: { section?: string; path?: string }, work: () => T): T {
  try {
    return work();
  } catch (error) {
    if (error instanceof EngineError) {
      const place: { section?: string; path?: string } = {};
      if (error.section === undefined && where.section !== undefined) place.section = where.section;
      if (error.path === undefined && where.path !== undefined) place.path = where.path;
      Object.assign(error, place);
    }
    throw error;
  }
}
