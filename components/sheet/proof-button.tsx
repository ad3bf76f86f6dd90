import { Button } from '@/components/ui/button';
import type { Result } from './result';

/** Opens the proof of a figure, at the end of its compartments. */
export function ProofButton({ result, onOpen }: { result: Result; onOpen: () => void }) {
  return (
    <Button look="quiet" onClick={onOpen}>
      Proof<span className="sr-only">{` of ${result.mark ?? result.source.trim()}`}</span>
    </Button>
  );
}
