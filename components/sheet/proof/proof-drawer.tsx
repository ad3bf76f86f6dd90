'use client';

import type { NotebookContent } from '@/lib/notebooks/content';
import { Mark } from '@/components/drawing/balloon';
import { Drawer } from '@/components/ui/drawer';
import { Sentence } from '@/components/ui/sentence';
import { Tex } from '@/components/ui/tex';
import type { SheetActions } from '../cells';
import { CopyMenu } from '../copy-menu';
import { ListTable } from '../lists/list-table';
import { countItems } from '../lists/say-list';
import type { Result } from '../result';
import { linesOf, SourceLine } from '../source-text';
import type { Place } from '../state/uses';
import { isLongList, largeTex } from '../value-tex';
import { CellSettingsPart } from './cell-settings-part';
import { CertificatePart } from './certificate-part';
import { DecimalPart } from './decimal-part';
import { Part, Wide } from './part';
import { FunctionPart, ListReachPart, RulePart } from './kind-parts';
import { CutPart, PolynomialPart, ReachPart, StandInPart, TowerPart } from './structure-parts';
import { WherePart } from './where-part';

interface ProofDrawerProps {
  content: NotebookContent;
  at: Place;
  /** Null while the line has no answer. */
  result: Result | null;
  mayWrite: boolean;
  actions: SheetActions;
  onClose: () => void;
}

/** All that is known of one figure: every statement with what it rests on. Loaded when first opened. */
export function ProofDrawer({ content, at, result, mayWrite, actions, onClose }: ProofDrawerProps) {
  const cell = content.cells.find(({ id }) => id === at.id);
  const text = linesOf(cell?.source ?? '')[at.line] ?? '';
  const mark = result?.mark ?? null;
  // Another text of the line is another figure: what was asked about the old one is forgotten.
  const figure = `${at.id}:${at.line}:${text}`;
  return (
    <Drawer
      title={<>Proof of {mark === null ? 'the figure' : <Mark mark={mark} />}</>}
      onClose={onClose}
    >
      <Part title="Source">
        <SourceLine text={text} />
      </Part>
      {result === null && (
        <p className="py-4 text-base text-soft">This line has no value to prove.</p>
      )}
      {result?.kind === 'error' && (
        <Part title="Not worked out">
          <p className="text-base text-ruddle">
            <Sentence text={result.error.message} />
          </p>
        </Part>
      )}
      {result && result.kind !== 'error' && <Figure result={result} />}
      {result?.kind === 'truth' && (
        <Part title={result.truth.value ? 'Decided: true, exactly' : 'Decided: false, exactly'}>
          <p className="text-base">
            <Sentence text={result.truth.reason} />
          </p>
        </Part>
      )}
      {(result?.kind === 'number' || result?.kind === 'angle') && (
        <DecimalPart key={figure} content={content} at={at} result={result} />
      )}
      {result?.kind === 'list' && (
        <Part title={countItems(result)}>
          <ListTable list={result} name={mark ?? text.trim()} />
        </Part>
      )}
      {result?.kind === 'list' && <ListReachPart list={result} />}
      {result?.kind === 'function' && <FunctionPart result={result} />}
      {(result?.kind === 'number' || result?.kind === 'angle') && <RulePart result={result} />}
      {result?.kind === 'number' && (
        <>
          <CutPart result={result} />
          <ReachPart reach={result.reach} />
          <PolynomialPart result={result} />
          <TowerPart result={result} />
        </>
      )}
      {result?.kind === 'angle' && <ReachPart reach={result.reach} />}
      {(result?.kind === 'number' || result?.kind === 'angle') && <StandInPart result={result} />}
      <WherePart cells={content.cells} at={at} mark={mark} actions={actions} />
      {mayWrite && cell && (
        <CellSettingsPart key={at.id} cell={cell} whole={content.settings} actions={actions} />
      )}
      {result?.kind === 'number' && (
        <CertificatePart key={figure} content={content} at={at} name={mark ?? 'value'} />
      )}
    </Drawer>
  );
}

/** The exact value, typeset and as the text that can be typed again. */
function Figure({ result }: { result: Result }) {
  const tex = largeTex(result);
  const isWritten = result.kind === 'function' || (result.kind === 'list' && isLongList(result));
  return (
    <Part title={isWritten ? 'As written' : 'Exact'}>
      {tex !== null && (
        <Wide label={isWritten ? 'As written' : 'Exact value'}>
          <span className="text-figure">
            <Tex tex={tex} display />
          </span>
        </Wide>
      )}
      {'exact' in result && result.kind !== 'list' && (
        <code className="mt-1 block max-h-40 overflow-y-auto font-mono text-small text-soft [overflow-wrap:anywhere]">
          {result.exact.text}
        </code>
      )}
      <CopyMenu result={result} />
    </Part>
  );
}
