/** Type under which an open pass is carried from the list to a column. */
export const PASS_DRAG_TYPE = 'application/x-skysheaf-pass';
