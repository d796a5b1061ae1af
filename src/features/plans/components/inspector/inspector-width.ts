/** Width of the charts in the inspector: its 344 px less the margins. */
export const INSPECTOR_CHART_WIDTH = 308;
