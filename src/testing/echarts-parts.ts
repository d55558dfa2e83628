import { CustomChart, LineChart } from 'echarts/charts';
import { DataZoomInsideComponent, GridComponent, TooltipComponent } from 'echarts/components';
import { init as initWithRenderer, setPlatformAPI, use } from 'echarts/core';
import { SVGRenderer } from 'echarts/renderers';

use([SVGRenderer, CustomChart, DataZoomInsideComponent, GridComponent, LineChart, TooltipComponent]);

// About the breadth of a character; nothing is laid out that a test could measure.
setPlatformAPI({ measureText: (text) => ({ width: text.length * 7 }) });

/** Draws as SVG at a fixed size: jsdom has neither a canvas nor a layout. */
export const init: typeof initWithRenderer = (element, theme, options) =>
  initWithRenderer(element, theme, { ...options, renderer: 'svg', width: 640, height: 240 });
