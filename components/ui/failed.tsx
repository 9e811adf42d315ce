import { Button } from './button';

/** What could not be asked for, and the way to try again. */
export function Failed({ message, onRetry, className = '' }: { message: string; onRetry: () => void; className?: string }) {
  return (
    <div role="alert" className={className}>
      <p>{message}</p>
      <Button className="mt-3" onClick={onRetry}>
        Try again
      </Button>
    </div>
  );
}
