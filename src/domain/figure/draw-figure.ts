import { escapeText } from '../charts/svg.ts';
import { describePose } from './describe-pose.ts';
import { group, INK, path } from './ink.ts';
import { bodyLayers, isSideOn, type Layers } from './layers.ts';
import { musclePath } from './muscles.ts';
import { angleArc, bodyLine, faultWedge, type ArcJoint } from './overlays.ts';
import { units } from './paths.ts';
import { propLayers } from './props.ts';
import type { SolvedPose } from './solve-pose.ts';
import type { Joint, ViewName } from './types.ts';
import { viewNameOf, viewOf, type View } from './view.ts';
import { windowOf, type Window } from './window.ts';

export interface DrawOptions {
  readonly title: string;
  readonly view?: ViewName | undefined;
  /** One floor and one scale for several figures; the figure's own when left out. */
  readonly window?: Window | undefined;
  /** Hatched by anatomical name; at most three are readable. */
  readonly muscles?: readonly string[] | undefined;
  readonly arcs?: readonly ArcJoint[] | undefined;
  /** The dotted line from ear to ankle. */
  readonly hasLine?: boolean | undefined;
  /** A fault: overlays in red, a wedge at this joint. */
  readonly faultAt?: Joint | undefined;
  /** Shading; on unless something else is hatched or measured. */
  readonly isHatched?: boolean | undefined;
  /** Thickens all lines; 2.4 for thumbnails. */
  readonly weight?: number | undefined;
  readonly className?: string | undefined;
}

const BAR_UNITS = 9;

function hash(text: string): string {
  let sum = 5381;
  for (let i = 0; i < text.length; i += 1) sum = ((sum * 33) ^ text.charCodeAt(i)) >>> 0;
  return sum.toString(36);
}

/** A figure as an SVG element of at most 6 kB, titled, and described in words from its angles and contacts. */
export function drawFigure(S: SolvedPose, options: DrawOptions): string {
  const viewName = viewNameOf(S.pose, options.view);
  const view = viewOf(viewName);
  const shown = options.window ?? windowOf(S, view);
  const hasOverlay = Boolean(options.muscles?.length || options.arcs?.length || options.hasLine);
  const layers = bodyLayers(S, view, options.isHatched ?? !hasOverlay);
  const content = paint(S, view, shown, layers, options);
  const weight = options.weight ?? 1;
  const drawn = weight === 1 ? content : thicken(content, weight);
  const [x, y] = [units(shown.left), units(shown.top)];
  const [width, height] = [units(shown.right - shown.left), units(shown.bottom - shown.top)];
  const names = ['figure', options.className].filter(Boolean).join(' ');
  return (
    `<svg class="${names}" viewBox="${x} ${y} ${width} ${height}" stroke-linejoin="round" stroke-linecap="round" ` +
    `paint-order="stroke" role="img"><title>${escapeText(options.title)}</title>` +
    `<desc>${escapeText(describePose(S, viewName))}</desc>${drawn}</svg>`
  );
}

const thicken = (content: string, weight: number) =>
  content.replace(
    /stroke-width="([\d.]+)"/g,
    (_, width: string) => `stroke-width="${+(Number(width) * weight).toFixed(2)}"`,
  );

function paint(S: SolvedPose, view: View, shown: Window, layers: Layers, options: DrawOptions): string {
  const tone = options.faultAt ? INK.fault : INK.mend;
  const props = propLayers(S, view);
  const floor = view.name === 'top' ? '' : `M${units(shown.left)} 0H${units(shown.right)}`;
  const bars = props.bars
    .map(([x, y]) => `<circle cx="${units(x)}" cy="${units(y)}" r="${BAR_UNITS}"/>`)
    .join('');
  return (
    group(`fill="${INK.prop}" fill-opacity=".16"`, path(props.fill) + path(props.mat, ' fill-opacity=".5"')) +
    group(`fill="none" stroke="${INK.prop}" stroke-width="2.1"`, path(props.fine)) +
    group(`fill="${INK.body}" stroke="${INK.far}" stroke-width="4.3"`, layers.far) +
    group(`fill="${INK.prop}" fill-opacity=".13"`, path(props.solid)) +
    group(`fill="none" stroke="${INK.prop}" stroke-width="3.4"`, path(props.back + floor)) +
    paintBody(S, view, layers, tone, options) +
    group(`fill="${INK.body}" stroke="${INK.prop}" stroke-width="3.4"`, bars + path(props.front)) +
    group('fill="none"', overlays(S, view, tone, options))
  );
}

/** Outlines are painted stroke first, so that overlapping parts unite; the lower right contour swells. */
function paintBody(S: SolvedPose, view: View, layers: Layers, tone: string, options: DrawOptions): string {
  const { head } = layers;
  const side = isSideOn(S, view);
  const muscles = group(
    `fill="none" stroke="${tone}" stroke-width="2.8"`,
    path(musclePath(S, view, options.muscles ?? [], side)),
  );
  const shade = (d: string) => group('fill="none" stroke-width="1.4" opacity=".6"', path(d));
  const id = `f${hash(layers.cloth + layers.skin + layers.shirt + view.name + options.title)}`;
  const hair = S.body.hair === 'thin' ? INK.far : INK.hair;
  return group(
    `fill="${INK.body}" stroke="${INK.ink}" stroke-width="5.2"`,
    layers.behind +
      group(`fill="${INK.ink}" transform="translate(1.5 2.5)"`, `<use href="#${id}"/>`) +
      path(layers.skin) +
      path(layers.cloth, ` id="${id}" fill="${INK.cloth}"`) +
      path(head.hair, ` fill="${hair}"`) +
      path(layers.shirt) +
      shade(layers.shade) +
      path(head.lines, ' fill="none" stroke-width="2.4"') +
      (side ? '' : muscles) +
      layers.legsOver +
      (side ? muscles : '') +
      layers.armsOver +
      shade(layers.armShade),
  );
}

function overlays(S: SolvedPose, view: View, tone: string, options: DrawOptions): string {
  const arcs = (options.arcs ?? []).map((joint) => angleArc(S, view, joint, tone));
  return (
    (options.hasLine ? bodyLine(S, view, tone) : '') +
    arcs.join('') +
    (options.faultAt ? faultWedge(S, view, options.faultAt) : '')
  );
}
