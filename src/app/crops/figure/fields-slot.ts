import type { CropFigures } from '@shared/contracts/crops';

interface Field {
  /** Name of its control. */
  readonly name: string;
  readonly label: string;
  /** What to give, for one who doesn't know. */
  readonly help: string;
  /** Whether the other fields, as they are typed, ask for it; without it always. */
  readonly isWanted?: (typed: TypedFields) => boolean;
}

/** A number; °C is typed in the reader's unit. */
export interface NumberField extends Field {
  readonly kind: 'number';
  readonly unit: string;
  /** Least and most, in the stored unit. */
  readonly bounds: readonly [least: number, most: number];
  readonly mayBeEmpty: boolean;
}

/** One of a few. */
export interface ChoiceField extends Field {
  readonly kind: 'choice';
  readonly choices: readonly { readonly value: string; readonly words: string }[];
}

/** Words on one line. */
export interface TextField extends Field {
  readonly kind: 'text';
  readonly maxLength: number;
}

/** A field of a figure that is more than a range. */
export type FigureField = NumberField | ChoiceField | TextField;

/** Fields by name, in stored units; null where one is empty. */
export type TypedFields = Readonly<Record<string, string | number | null>>;

/** What is wrong with a field, in a sentence. */
export interface FieldProblem {
  readonly name: string;
  readonly words: string;
}

/** A figure of a crop that is made up of fields. */
export interface FieldsSlot {
  readonly kind: 'fields';
  readonly title: string;
  readonly fields: readonly FigureField[];
  /** What it is now; null where there is no figure yet. */
  readonly figure: { readonly values: TypedFields; readonly source: string } | null;
  /** Whether somebody is named who says so. */
  readonly hasSource: boolean;
  /** What is wrong between the fields. Each by itself is there and within its bounds. */
  readonly problemOf: (values: TypedFields) => FieldProblem | null;
  /** The crop's figures with another one here. */
  readonly with: (values: TypedFields, source: string) => CropFigures;
  /** The crop's figures without it. */
  readonly without: () => CropFigures;
}
