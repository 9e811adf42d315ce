/** Bytes handed to the browser at a time: many small pieces cost it more than they hold. */
const CHUNK = 16 * 1024 * 1024;

/** Gathers bytes into a Blob, which the browser keeps and not the page. */
export class BlobSink {
  private readonly chunks: Blob[] = [];
  private waiting: Uint8Array<ArrayBuffer>[] = [];
  private size = 0;

  push(bytes: Uint8Array<ArrayBuffer>): void {
    this.waiting.push(bytes);
    this.size += bytes.byteLength;
    if (this.size >= CHUNK) this.flush();
  }

  blob(type: string): Blob {
    this.flush();
    return new Blob(this.chunks, { type });
  }

  private flush(): void {
    if (this.size > 0) this.chunks.push(new Blob(this.waiting));
    this.waiting = [];
    this.size = 0;
  }
}
