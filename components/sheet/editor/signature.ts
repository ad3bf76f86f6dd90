import { StateField, type EditorState, type Extension } from '@codemirror/state';
import { showTooltip, type Tooltip } from '@codemirror/view';
import { callAt, parameterOf, parametersOf } from './call-at';

/** The signature of a function by its name; null for what is no function. */
export type FindSignature = (name: string) => string | null;

interface Shown {
  /** What was shown last; equal text means the same tooltip, which then stays as it is. */
  key: string;
  tooltip: Tooltip | null;
}

const NOTHING: Shown = { key: '', tooltip: null };

function draw(name: string, parameters: readonly string[], inHand: number | null): HTMLElement {
  const box = document.createElement('div');
  box.className = 'signature-line';
  box.append(`${name}(`);
  parameters.forEach((parameter, index) => {
    if (index > 0) box.append(', ');
    const part = document.createElement(index === inHand ? 'b' : 'span');
    part.textContent = parameter;
    box.append(part);
  });
  box.append(')');
  return box;
}

/** While the cursor stands within the brackets of a call: its signature above, with the parameter in hand. */
export function signatureHelp(findSignature: FindSignature): Extension {
  const look = (state: EditorState, before: Shown): Shown => {
    const { main } = state.selection;
    if (!main.empty) return NOTHING;
    const line = state.doc.lineAt(main.head);
    const call = callAt(line.text, main.head - line.from, (name) => findSignature(name) !== null);
    const signature = call && findSignature(call.name);
    if (!call || signature === null) return NOTHING;
    const pos = line.from + call.from;
    const key = `${pos} ${call.argument} ${signature}`;
    if (key === before.key) return before;
    const parameters = parametersOf(signature);
    const inHand = parameterOf(parameters, call.argument);
    return {
      key,
      tooltip: {
        pos,
        above: true,
        create: () => ({ dom: draw(call.name, parameters, inHand) }),
      },
    };
  };
  return StateField.define<Shown>({
    create: (state) => look(state, NOTHING),
    update: (before, change) =>
      change.docChanged || change.selection ? look(change.state, before) : before,
    provide: (field) => showTooltip.from(field, ({ tooltip }) => tooltip),
  });
}
