/** Stable codes of the rules that a caller's data can break; the HTTP layer alone turns them into a status. */
export type DomainErrorCode = 'OUT_OF_RANGE' | 'EMPTY_SERIES' | 'UNORDERED_SERIES' | 'INVALID_ARGUMENT';

/** A rule of the domain was broken by the caller's data; retrying unchanged cannot help. */
export class DomainError extends Error {
  override readonly name: string = 'DomainError';

  /**
   * @param code - Stable code that callers and tests compare.
   * @param message - One sentence for a log or a developer.
   * @param details - The facts behind the message, as data.
   * @param options - `cause`, where another error led to this one.
   */
  constructor(
    readonly code: DomainErrorCode,
    message: string,
    readonly details: Readonly<Record<string, string | number>> = {},
    options?: ErrorOptions,
  ) {
    super(message, options);
  }
}

/**
 * Refuses a number outside a closed range.
 *
 * @param name - Name of the quantity with its unit, as in code (`temperatureC`).
 * @param value - The value to check.
 * @param low - Lowest value allowed.
 * @param high - Highest value allowed.
 * @throws {@link DomainError} `OUT_OF_RANGE` when the value is below `low`, above `high`, or NaN.
 */
export function requireInRange(name: string, value: number, low: number, high: number): void {
  // Written as a conjunction so that NaN, which fails every comparison, is refused too.
  const isInRange = value >= low && value <= high;
  if (!isInRange) {
    throw new DomainError('OUT_OF_RANGE', `${name} must be from ${low} to ${high}, but is ${value}`, {
      name,
      value,
      low,
      high,
    });
  }
}
