import type { UserRole } from '../queries/users';

/**
 * One account for each role, everybody in it invented. They are seeded into the cluster that `npm start` makes for itself,
 * which listens on 127.0.0.1 only, and never into a database elsewhere: their passwords can be read here.
 */
export const demoAccounts: readonly { name: string; email: string; role: UserRole; password: string }[] = [
  { name: 'Ilse Marrow', email: 'composer@sesqui.example', role: 'composer', password: 'tam-quern-5-4-osier' },
  { name: 'Teodor Quill', email: 'teacher@sesqui.example', role: 'teacher', password: 'log-heron-3-2-basin' },
  { name: 'Wren Abara', email: 'student@sesqui.example', role: 'student', password: 'pot-sedge-4-3-towpath' },
  { name: 'Maud Lindqvest', email: 'administrator@sesqui.example', role: 'administrator', password: 'key-wharf-6-5-paddle' },
];
