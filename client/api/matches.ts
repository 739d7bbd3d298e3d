/** A shape to hold an answer against, where a page must do without a schema library. */
export type Shape =
  | 'string'
  | 'number'
  | 'boolean'
  | 'any'
  | { orNull: Shape }
  | { oneOf: readonly string[] }
  | readonly [Shape]
  | { fields: Record<string, Shape> };

/** Whether an answer has a shape. `[shape]` is a list of any length; fields beyond those named are let be. */
export function matches(answer: unknown, shape: Shape): boolean {
  if (shape === 'any') return true;
  if (shape === 'number') return typeof answer === 'number' && Number.isFinite(answer);
  if (typeof shape === 'string') return typeof answer === shape;
  if (isListShape(shape)) {
    return Array.isArray(answer) && answer.every((each) => matches(each, shape[0]));
  }
  if ('orNull' in shape) return answer === null || matches(answer, shape.orNull);
  if ('oneOf' in shape) return typeof answer === 'string' && shape.oneOf.includes(answer);
  if (typeof answer !== 'object' || answer === null) return false;
  const fields = new Map<string, unknown>(Object.entries(answer));
  return Object.entries(shape.fields).every(([name, field]) => matches(fields.get(name), field));
}

function isListShape(shape: Shape): shape is readonly [Shape] {
  return Array.isArray(shape);
}
