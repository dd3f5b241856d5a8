import { CustomChart, LineChart, type CustomSeriesOption, type LineSeriesOption } from 'echarts/charts'
import { GridComponent, type GridComponentOption } from 'echarts/components'
import { use, type ComposeOption } from 'echarts/core'
import { SVGRenderer } from 'echarts/renderers'

use([SVGRenderer, GridComponent, LineChart, CustomChart])

/** Options of the charts made of lines and of shapes drawn by hand. */
export type CurveChartOption = ComposeOption<GridComponentOption | LineSeriesOption | CustomSeriesOption>
