import { Color, DoubleSide, ShaderMaterial } from 'three';
import type { Inks } from '../useInks.ts';

/** Paper-coloured faces with a pencil tone by their inclination; the chosen member in the focus ink. */
export function faceMaterial(inks: Inks): ShaderMaterial {
  return new ShaderMaterial({
    uniforms: {
      sheet: { value: new Color(inks.sheet) },
      ink: { value: new Color(inks.ink) },
      focus: { value: new Color(inks.focus) },
    },
    vertexShader: /* glsl */ `
      attribute mat4 place;
      attribute float chosen;
      varying vec3 vNormal;
      varying float vChosen;
      void main() {
        vChosen = chosen;
        vNormal = normalize(mat3(place) * normal);
        gl_Position = projectionMatrix * viewMatrix * place * vec4(position, 1.0);
      }
    `,
    fragmentShader: /* glsl */ `
      uniform vec3 sheet;
      uniform vec3 ink;
      uniform vec3 focus;
      varying vec3 vNormal;
      varying float vChosen;
      void main() {
        float light = 0.5 + 0.5 * dot(normalize(vNormal), normalize(vec3(-0.35, -0.5, 0.8)));
        float tone = mix(0.36, 0.05, light);
        vec3 colour = mix(sheet, ink, tone);
        gl_FragColor = vec4(mix(colour, focus, vChosen * 0.35), 1.0);
        #include <colorspace_fragment>
      }
    `,
    side: DoubleSide,
    polygonOffset: true,
    polygonOffsetFactor: 1,
    polygonOffsetUnits: 1,
  });
}

/** The drawn edges of members. */
export function edgeMaterial(inks: Inks): ShaderMaterial {
  return new ShaderMaterial({
    uniforms: { ink: { value: new Color(inks.ink) } },
    vertexShader: /* glsl */ `
      attribute mat4 place;
      void main() {
        gl_Position = projectionMatrix * viewMatrix * place * vec4(position, 1.0);
      }
    `,
    fragmentShader: /* glsl */ `
      uniform vec3 ink;
      void main() {
        gl_FragColor = vec4(ink, 1.0);
        #include <colorspace_fragment>
      }
    `,
  });
}

/** Palest ink that can still be told from the ground. */
const PALEST = 0.16;

/**
 * A moving mode: `position` is the place at rest, `swing` [m] what the mode adds at full amplitude, `amount` 0…1 how
 * much of the largest displacement that is: pale ink where hardly anything moves, full ink where most does.
 */
export function movingMaterial(inks: Inks, shaded: boolean): ShaderMaterial {
  return new ShaderMaterial({
    uniforms: {
      sheet: { value: new Color(inks.sheet) },
      ink: { value: new Color(inks.ink) },
      factor: { value: 0 },
    },
    vertexShader: /* glsl */ `
      uniform float factor;
      attribute vec3 swing;
      attribute float amount;
      varying float vAmount;
      varying vec3 vNormal;
      void main() {
        vAmount = amount;
        vNormal = ${shaded ? 'normal' : 'vec3(0.0)'};
        gl_Position = projectionMatrix * viewMatrix * vec4(position + factor * swing, 1.0);
      }
    `,
    fragmentShader: /* glsl */ `
      uniform vec3 sheet;
      uniform vec3 ink;
      varying float vAmount;
      varying vec3 vNormal;
      void main() {
        float light = ${shaded ? '0.5 + 0.5 * dot(normalize(vNormal), normalize(vec3(-0.35, -0.5, 0.8)))' : '0.0'};
        float strength = mix(${PALEST.toFixed(2)}, 1.0, vAmount);
        gl_FragColor = vec4(mix(sheet, ink, strength * mix(1.0, 0.72, light)), 1.0);
        #include <colorspace_fragment>
      }
    `,
    side: DoubleSide,
  });
}
