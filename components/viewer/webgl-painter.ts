import { levelFor } from './grey-view';
import type { GreyPainter, GreyView } from './grey-view';
import type { GreyLevel } from './packed-pixels';

const vertexSource = `#version 300 es
void main() { vec2 corner = vec2(gl_VertexID == 1 ? 3.0 : -1.0, gl_VertexID == 2 ? 3.0 : -1.0); gl_Position = vec4(corner, 0.0, 1.0); }`;

// Integer textures are never filtered by the hardware: between pixels we interpolate ourselves, and above 2:1 show each pixel as it is.
const fragmentSource = `#version 300 es
precision highp float; precision highp int; precision highp usampler2D;
uniform usampler2D grey; uniform vec2 origin; uniform float scale; uniform float reduction; uniform float screenHeight;
uniform vec2 window; uniform bool invert; out vec4 colour;
float at(ivec2 place, ivec2 size) { return float(texelFetch(grey, clamp(place, ivec2(0), size - 1), 0).r); }
void main() {
  ivec2 size = textureSize(grey, 0);
  vec2 screen = vec2(gl_FragCoord.x, screenHeight - gl_FragCoord.y);
  vec2 place = (origin + screen / scale) / reduction;
  if (any(lessThan(place, vec2(0.0))) || any(greaterThanEqual(place, vec2(size)))) { colour = vec4(0.0, 0.0, 0.0, 1.0); return; }
  float value;
  if (scale >= 2.0) { value = at(ivec2(floor(place)), size); }
  else {
    vec2 low = floor(place - 0.5); vec2 part = place - 0.5 - low; ivec2 corner = ivec2(low);
    value = mix(mix(at(corner, size), at(corner + ivec2(1, 0), size), part.x), mix(at(corner + ivec2(0, 1), size), at(corner + ivec2(1, 1), size), part.x), part.y);
  }
  float share = clamp((value - window.x) / max(1.0, window.y - window.x), 0.0, 1.0);
  colour = vec4(vec3(invert ? 1.0 - share : share), 1.0);
}`;

/** A painter with 16-bit integer textures, or null where WebGL2 is missing or the picture exceeds its texture size. */
export function webGlPainter(canvas: HTMLCanvasElement, levels: readonly GreyLevel[]): GreyPainter | null {
  const [largest] = levels;
  if (!largest || !fitsTextures(largest)) return null;
  const gl = canvas.getContext('webgl2', { alpha: false, antialias: false, preserveDrawingBuffer: true });
  if (!gl) return null;
  const program = programOf(gl);
  const textures = levels.map(() => null as WebGLTexture | null);
  const uniform = (name: string) => gl.getUniformLocation(program, name);
  const places = {
    origin: uniform('origin'),
    scale: uniform('scale'),
    reduction: uniform('reduction'),
    screenHeight: uniform('screenHeight'),
    window: uniform('window'),
    invert: uniform('invert'),
  };
  const paint = (view: GreyView) => {
    const scale = view.viewport.zoom * view.devicePixelRatio;
    const number = levelFor(levels, scale);
    const level = levels[number];
    if (!level) return;
    textures[number] ??= textureOf(gl, level);
    gl.viewport(0, 0, canvas.width, canvas.height);
    gl.useProgram(program);
    gl.bindTexture(gl.TEXTURE_2D, textures[number]);
    gl.uniform2f(places.origin, view.viewport.left, view.viewport.top);
    gl.uniform1f(places.scale, scale);
    gl.uniform1f(places.reduction, 2 ** number);
    gl.uniform1f(places.screenHeight, canvas.height);
    gl.uniform2f(places.window, view.low, view.high);
    gl.uniform1i(places.invert, view.invert ? 1 : 0);
    gl.drawArrays(gl.TRIANGLES, 0, 3);
  };
  // The context itself is kept: a canvas that lost it would never paint again.
  const release = () => {
    textures.forEach((texture) => gl.deleteTexture(texture));
    gl.deleteProgram(program);
  };
  return { by: 'webgl2', paint, release };
}

// Asked of a canvas of its own, so that the real one can still take the other way of painting.
function fitsTextures({ width, height }: GreyLevel): boolean {
  const gl = document.createElement('canvas').getContext('webgl2');
  if (!gl) return false;
  const most = gl.getParameter(gl.MAX_TEXTURE_SIZE) as number;
  gl.getExtension('WEBGL_lose_context')?.loseContext();
  return width <= most && height <= most;
}

function programOf(gl: WebGL2RenderingContext): WebGLProgram {
  const program = gl.createProgram();
  const parts = [
    [gl.VERTEX_SHADER, vertexSource],
    [gl.FRAGMENT_SHADER, fragmentSource],
  ] as const;
  for (const [kind, source] of parts) {
    const shader = gl.createShader(kind);
    if (!shader) throw new Error('The graphics context was lost.');
    gl.shaderSource(shader, source);
    gl.compileShader(shader);
    gl.attachShader(program, shader);
    gl.deleteShader(shader);
  }
  gl.linkProgram(program);
  if (!gl.getProgramParameter(program, gl.LINK_STATUS))
    throw new Error(`The picture cannot be drawn: ${gl.getProgramInfoLog(program) ?? ''}`);
  return program;
}

function textureOf(gl: WebGL2RenderingContext, { width, height, pixels }: GreyLevel): WebGLTexture {
  const texture = gl.createTexture();
  gl.bindTexture(gl.TEXTURE_2D, texture);
  // Rows of an odd number of 16-bit pixels are not aligned to four bytes.
  gl.pixelStorei(gl.UNPACK_ALIGNMENT, 2);
  gl.texParameteri(gl.TEXTURE_2D, gl.TEXTURE_MIN_FILTER, gl.NEAREST);
  gl.texParameteri(gl.TEXTURE_2D, gl.TEXTURE_MAG_FILTER, gl.NEAREST);
  gl.texImage2D(gl.TEXTURE_2D, 0, gl.R16UI, width, height, 0, gl.RED_INTEGER, gl.UNSIGNED_SHORT, pixels);
  return texture;
}
