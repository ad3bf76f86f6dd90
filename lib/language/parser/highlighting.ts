import { styleTags, tags } from '@lezer/highlight';

/** How the parts of a line are named to an editor's colour scheme. */
export const cellHighlighting = styleTags({
  Number: tags.number,
  'Target/...': tags.definition(tags.variableName),
  'FunctionTarget Parameter': tags.definition(tags.variableName),
  Mark: tags.variableName,
  FunctionName: tags.function(tags.variableName),
  'UnitName DegreeSign MinuteSign SecondSign PartUnit/FunctionName': tags.unit,
  'ConstantName PiSign': tags.constant(tags.variableName),
  WhereWord: tags.keyword,
  'AddOp MulOp Caret Superscript RootSign': tags.arithmeticOperator,
  Relation: tags.compareOperator,
  DefinitionSign: tags.definitionOperator,
  'OpenBracket CloseBracket': tags.paren,
  'OpenSquare CloseSquare': tags.squareBracket,
  Comma: tags.separator,
  Remark: tags.lineComment,
});
