/**
 * A setting that `npm test` passes to the tests.
 * @throws Error telling to run `npm test`, so that nothing passes for want of a database
 */
export function setting(name: 'TEST_DATABASE_URL' | 'TEST_BASE_URL' | 'TEST_APPLICATION_DATABASE_URL' | 'TEST_SECRET'): string {
  const value = process.env[name];
  if (!value) throw new Error(`${name} is not set: run these tests by npm test, which starts what they need (npm test unit runs them alone).`);
  return value;
}
