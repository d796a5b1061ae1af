import type { ElementFault } from '../element-set.ts';

/** A fault of the file's form, thrown by a scanner and caught by its reader. */
export class FormFault extends Error {
  readonly fault: ElementFault;

  constructor(fault: ElementFault) {
    super(fault.reason);
    this.name = 'FormFault';
    this.fault = fault;
  }
}

export interface Place {
  line: number;
  column: number;
}

/** Walks a text and knows the line and column, 1-based, of where it is. */
export class TextCursor {
  readonly text: string;
  index = 0;
  line = 1;
  private lineStart = 0;

  constructor(text: string) {
    this.text = text;
  }

  get place(): Place {
    return { line: this.line, column: this.index - this.lineStart + 1 };
  }

  get isAtEnd(): boolean {
    return this.index >= this.text.length;
  }

  /** The next characters, without moving. */
  peek(count = 1): string {
    return this.text.slice(this.index, this.index + count);
  }

  /** Moves on and gives what was passed. */
  take(count = 1): string {
    const taken = this.peek(count);
    for (const character of taken) {
      this.index += character.length;
      if (character !== '\n') continue;
      this.line += 1;
      this.lineStart = this.index;
    }
    return taken;
  }

  /** Takes what a sticky pattern matches here; empty when it does not. */
  takeMatch(pattern: RegExp): string {
    pattern.lastIndex = this.index;
    return this.take(pattern.exec(this.text)?.[0].length ?? 0);
  }

  fail(code: string, reason: string, place: Place = this.place): never {
    throw new FormFault({ ...place, code, reason });
  }
}

/** The value of a scan, or the fault that stopped it. */
export function scanned<T>(scan: () => T): { value: T } | { fault: ElementFault } {
  try {
    return { value: scan() };
  } catch (error) {
    if (error instanceof FormFault) return { fault: error.fault };
    throw error;
  }
}
