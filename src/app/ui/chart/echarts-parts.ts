import { CustomChart, LineChart } from 'echarts/charts';
import { DataZoomInsideComponent, GridComponent, TooltipComponent } from 'echarts/components';
import { init, use } from 'echarts/core';
import { CanvasRenderer } from 'echarts/renderers';

// Only what our charts draw with; this file is loaded when the first chart is shown.
use([CanvasRenderer, CustomChart, DataZoomInsideComponent, GridComponent, LineChart, TooltipComponent]);

export { init };
