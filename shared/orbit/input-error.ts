/** An input that cannot be used; `field` names it by its path in the query, such as `observer.latitudeDeg`. */
export class OrbitInputError extends Error {
  readonly field: string;

  constructor(field: string, message: string) {
    super(`${field}: ${message}`);
    this.name = 'OrbitInputError';
    this.field = field;
  }
}

/** Throws an `OrbitInputError` unless the condition holds. */
export function requireInput(
  condition: boolean,
  field: string,
  message: string,
): asserts condition {
  if (!condition) throw new OrbitInputError(field, message);
}
