import type { FieldsSlot } from './fields-slot';
import type { FigureSlot } from './figure-slot';
import type { TableSlot } from './table-slot';

/** A figure of a crop that can be changed, by what it is typed as. */
export type CropSlot = FigureSlot | FieldsSlot | TableSlot;
