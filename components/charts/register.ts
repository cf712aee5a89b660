import {
  BarController,
  BarElement,
  CategoryScale,
  Chart,
  Filler,
  LinearScale,
  LineController,
  LineElement,
  PointElement,
  ScatterController,
} from "chart.js";
import annotation from "chartjs-plugin-annotation";

/** Only the parts of Chart.js that the charts use; importing this file registers them once. */
Chart.register(
  BarController,
  BarElement,
  CategoryScale,
  LinearScale,
  LineController,
  LineElement,
  PointElement,
  ScatterController,
  Filler,
  annotation,
);

export { Chart };
