import {
  BufferAttribute,
  BufferGeometry,
  Color,
  DirectionalLight,
  HemisphereLight,
  LineBasicMaterial,
  LineSegments,
  Mesh,
  MeshLambertMaterial,
  PerspectiveCamera,
  Scene,
  Spherical,
  Vector3,
  WebGLRenderer,
} from "three";
import { OrbitControls } from "three/addons/controls/OrbitControls.js";
import type { Turnable } from "@/lib/client/fit/turnable";

/** Colours as CSS writes them, and whether the person asked for no motion. */
export interface SceneLook {
  readonly paper: string;
  readonly surface: string;
  readonly ink: string;
  readonly still: boolean;
}

export interface TurnScene {
  /** Turns the eye about the model, rad: to the right and upwards. */
  turn(rightRad: number, upRad: number): void;
  /** Above 1 brings it nearer. */
  nearer(factor: number): void;
  reset(): void;
  paint(look: SceneLook): void;
  dispose(): void;
}

const FIELD_DEG = 30;
const MOVE_MS = 160;
/** Where one looks from at first: three quarters, a little from above. */
const FIRST = { azimuth: 0.55, polar: 1.05 };
const POLAR_MARGIN = 0.02;

/**
 * Shows a mesh as paper with ink lines. It is drawn when something changes and else not at all.
 *
 * @throws Error where the browser has no WebGL
 */
export function startScene(canvas: HTMLCanvasElement, model: Turnable, first: SceneLook): TurnScene {
  const renderer = new WebGLRenderer({ canvas, antialias: true });
  const scene = new Scene();
  const surface = new BufferGeometry();
  surface.setAttribute("position", new BufferAttribute(model.positions, 3));
  surface.setIndex(new BufferAttribute(model.triangles, 1));
  const paperMaterial = new MeshLambertMaterial({
    flatShading: true,
    polygonOffset: true,
    polygonOffsetFactor: 1,
    polygonOffsetUnits: 1,
  });
  const lines = new BufferGeometry();
  lines.setAttribute("position", new BufferAttribute(model.edges, 3));
  const inkMaterial = new LineBasicMaterial();
  scene.add(new Mesh(surface, paperMaterial), new LineSegments(lines, inkMaterial));
  const sky = new HemisphereLight();
  const lamp = new DirectionalLight();
  const camera = new PerspectiveCamera(FIELD_DEG, 1, model.radius / 50, model.radius * 20);
  camera.up.set(0, 0, 1);
  camera.add(lamp);
  lamp.position.set(-0.6, 0.8, 1);
  scene.add(sky, camera);
  const controls = new OrbitControls(camera, canvas);
  controls.enablePan = false;
  controls.enableDamping = false;
  controls.minDistance = model.radius * 1.2;
  controls.maxDistance = model.radius * 12;
  let still = first.still;
  let moving = 0;
  const draw = (): void => renderer.render(scene, camera);

  const farEnough = (): number =>
    (model.radius / Math.sin((FIELD_DEG * Math.PI) / 360)) * Math.max(1, 1 / camera.aspect);
  // Spherical coordinates of three have their pole on y; the model's is z.
  const where = (): Spherical => {
    const { x, y, z } = camera.position;
    return new Spherical().setFromVector3(new Vector3(x, z, -y));
  };
  const place = ({ radius, phi, theta }: Spherical): void => {
    const at = new Vector3().setFromSpherical(new Spherical(radius, phi, theta));
    camera.position.set(at.x, -at.z, at.y);
    controls.update();
    draw();
  };
  const goTo = (to: Spherical): void => {
    cancelAnimationFrame(moving);
    to.phi = Math.min(Math.PI - POLAR_MARGIN, Math.max(POLAR_MARGIN, to.phi));
    if (still) {
      place(to);
      return;
    }
    const from = where();
    const began = performance.now();
    const step = (): void => {
      const share = Math.min(1, (performance.now() - began) / MOVE_MS);
      const between = (a: number, b: number): number => a + (b - a) * share * (2 - share);
      place(new Spherical(between(from.radius, to.radius), between(from.phi, to.phi), between(from.theta, to.theta)));
      if (share < 1) moving = requestAnimationFrame(step);
    };
    moving = requestAnimationFrame(step);
  };
  const resize = (): void => {
    const { clientWidth: width, clientHeight: height } = canvas;
    if (width === 0 || height === 0) return;
    renderer.setPixelRatio(Math.min(2, window.devicePixelRatio));
    renderer.setSize(width, height, false);
    camera.aspect = width / height;
    camera.updateProjectionMatrix();
    draw();
  };
  const watch = new ResizeObserver(resize);
  const paint = (look: SceneLook): void => {
    still = look.still;
    scene.background = new Color(look.paper);
    paperMaterial.color = new Color(look.surface);
    inkMaterial.color = new Color(look.ink);
    sky.color = new Color(1, 1, 1);
    sky.groundColor = new Color(0.55, 0.55, 0.55);
    sky.intensity = 2.1;
    lamp.intensity = 1.1;
    draw();
  };
  controls.addEventListener("change", draw);
  resize();
  place(new Spherical(farEnough(), FIRST.polar, FIRST.azimuth));
  paint(first);
  watch.observe(canvas);

  return {
    turn(rightRad, upRad) {
      const { radius, phi, theta } = where();
      goTo(new Spherical(radius, phi - upRad, theta + rightRad));
    },
    nearer(factor) {
      const { radius, phi, theta } = where();
      const far = Math.min(controls.maxDistance, Math.max(controls.minDistance, radius / factor));
      goTo(new Spherical(far, phi, theta));
    },
    reset: () => goTo(new Spherical(farEnough(), FIRST.polar, FIRST.azimuth)),
    paint,
    dispose() {
      cancelAnimationFrame(moving);
      watch.disconnect();
      controls.dispose();
      for (const part of [surface, lines, paperMaterial, inkMaterial]) part.dispose();
      renderer.dispose();
    },
  };
}
