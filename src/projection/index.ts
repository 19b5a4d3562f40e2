export type { Band } from "./band.js";
export type { PathDraws } from "./draw-paths.js";
export { type Forecast, type ForecastOptions, forecast, type GroupForecast } from "./forecast.js";
