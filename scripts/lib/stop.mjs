/** Something the person at the terminal can mend: its message is one sentence that says what to do. */
export class Stop extends Error {
  constructor(message) {
    super(message);
    this.name = 'Stop';
  }
}
