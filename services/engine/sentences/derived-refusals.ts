import type { SentenceCatalogue } from './sentence';

/** Why a derived quantity is refused although its entries can be read: what was measured does not carry it. */
export const derivedRefusalSentences = {
  'echo-before-zero': {
    en: 'The echo at {transitUs} µs is no later than the zero at {zeroUs} µs.',
    fr: 'L’écho à {transitUs} µs ne suit pas le zéro à {zeroUs} µs.',
  },
  'blocks-not-thin-then-thick': {
    en: 'The second block must be thicker than the first.',
    fr: 'La seconde cale doit être plus épaisse que la première.',
  },
  'transit-does-not-grow': {
    en: 'The transit through the thick block must be longer than through the thin one.',
    fr: 'Le temps de parcours dans la cale épaisse doit dépasser celui de la mince.',
  },
  'outside-blocks': {
    en: 'The wall lies outside the two blocks: calibrate on blocks that bracket it.',
    fr: 'La paroi sort des deux cales : étalonner sur des cales qui l’encadrent.',
  },
  'block-unstated': { en: 'The block does not state its {what}.', fr: 'La cale n’indique pas son {what}.' },
  'part-unstated': { en: 'The part does not state its {what}.', fr: 'La pièce n’indique pas son {what}.' },
  'block-other-alloy': {
    en: 'The block is of {block}, the part of {part}.',
    fr: 'La cale est en {block}, la pièce en {part}.',
  },
  'block-other-orientation': {
    en: 'The grain of the block is {block}, of the part {part}.',
    fr: 'Le grain de la cale est {block}, celui de la pièce {part}.',
  },
  'order-used-twice': { en: 'Two events stand at place {order}.', fr: 'Deux événements ont le rang {order}.' },
  'motion-not-determined': {
    en: '{pairs} wall pairs do not determine the motion of the core: measure on both axes, and apart from each other.',
    fr: '{pairs} paires de parois ne déterminent pas le mouvement du noyau : mesurer sur les deux axes et à distance.',
  },
  'magnification-below-one': {
    en: 'The magnification {magnification} is below 1.',
    fr: 'L’agrandissement {magnification} est inférieur à 1.',
  },
  'indicator-unknown': {
    en: '{designation} is in no table of image quality indicators.',
    fr: '{designation} n’est dans aucun tableau d’indicateurs de qualité d’image.',
  },
  'indicators-not-comparable': {
    en: 'No standard equates the indicator seen with the one required.',
    fr: 'Aucune norme ne rapproche l’indicateur vu de celui exigé.',
  },
  'level-unknown': { en: '{mark} is not a quality level.', fr: '{mark} n’est pas un niveau de qualité.' },
  'part-too-thin-for-plaques': {
    en: 'The part is too thin for plaque {thinnest}: the plan must say what counts.',
    fr: 'La pièce est trop mince pour la plaque {thinnest} : la gamme doit dire ce qui compte.',
  },
  'region-not-a-rectangle': {
    en: 'The grey values do not fill a rectangle.',
    fr: 'Les niveaux de gris ne remplissent pas un rectangle.',
  },
  'region-too-small': {
    en: 'The region has {pixels} pixels; {needed} are needed.',
    fr: 'La région a {pixels} pixels ; il en faut {needed}.',
  },
  'grey-value-missing': { en: 'A grey value is missing.', fr: 'Un niveau de gris manque.' },
  'region-saturated': {
    en: 'Grey values reach {fullFrom}: the detector is full.',
    fr: 'Des niveaux de gris atteignent {fullFrom} : le détecteur sature.',
  },
  'region-without-signal': { en: 'The region has no signal.', fr: 'La région n’a pas de signal.' },
  'region-without-noise': {
    en: 'The region has no noise: these are no measured grey values.',
    fr: 'La région n’a pas de bruit : ce ne sont pas des niveaux mesurés.',
  },
  'profile-too-short': {
    en: 'The line has {samples} samples; {needed} are needed.',
    fr: 'La ligne a {samples} points ; il en faut {needed}.',
  },
  'profile-not-numbers': {
    en: 'The line or its step is not made of numbers.',
    fr: 'La ligne ou son pas n’est pas faite de nombres.',
  },
  'profile-too-coarse': {
    en: 'A step of {stepMm} mm cannot tell wires of {wireMm} mm apart.',
    fr: 'Un pas de {stepMm} mm ne sépare pas des fils de {wireMm} mm.',
  },
  'gauge-not-recognised': {
    en: 'The line does not show a duplex gauge: pair {pair} has not its width. It must begin and end on bare ground.',
    fr: 'La ligne ne montre pas d’indicateur duplex : la paire {pair} n’a pas sa largeur. Elle doit commencer et finir sur le fond.',
  },
  'duplex-contrast-low': {
    en: 'Pair {pair} stands too little out of the noise: average more lines or expose longer.',
    fr: 'La paire {pair} sort trop peu du bruit : moyenner plus de lignes ou exposer plus longtemps.',
  },
  'duplex-pair-uneven': {
    en: 'The two wires of pair {pair} differ too much.',
    fr: 'Les deux fils de la paire {pair} diffèrent trop.',
  },
  'duplex-dips-rise': {
    en: 'Pair {pair} shows a deeper dip than the wider one before it.',
    fr: 'La paire {pair} montre un creux plus profond que la plus large avant elle.',
  },
  'duplex-none-resolved': { en: 'Not even the widest pair is resolved.', fr: 'Même la paire la plus large n’est pas résolue.' },
  'duplex-all-resolved': {
    en: 'All {pairs} pairs are resolved: the gauge is too coarse.',
    fr: 'Les {pairs} paires sont résolues : l’indicateur est trop grossier.',
  },
  'wires-not-above-ground': { en: 'The wires do not stand out of the ground.', fr: 'Les fils ne sortent pas du fond.' },
  'outside-dwell-rule': {
    en: 'The rule gives no dwell at {fahrenheit} °F.',
    fr: 'La règle ne donne pas de durée à {fahrenheit} °F.',
  },
  'size-outside-limits': {
    en: 'The size {size} mm is outside {lower} to {upper} mm: it fails by itself and gives no bonus.',
    fr: 'La taille {size} mm sort de {lower} à {upper} mm : elle est refusée d’elle-même et ne donne pas de bonus.',
  },
  'circle-not-determined': {
    en: 'The {points} points lie on a line or are too few for a circle.',
    fr: 'Les {points} points sont alignés ou trop peu pour un cercle.',
  },
  'points-are-one': { en: 'The two points are one.', fr: 'Les deux points n’en font qu’un.' },
  'points-unpaired': { en: '{source} points stand beside {target}.', fr: '{source} points font face à {target}.' },
  'too-few-points': { en: '{points} points; {needed} are needed.', fr: '{points} points ; il en faut {needed}.' },
  'turn-not-determined': {
    en: 'The points leave a turn free: measure points that do not lie on one line.',
    fr: 'Les points laissent une rotation libre : mesurer des points non alignés.',
  },
  'normal-without-direction': {
    en: 'The normal of point {point} has no direction.',
    fr: 'La normale du point {point} n’a pas de direction.',
  },
  'no-pressure-drop': {
    en: 'The outlet at {outletPressureKPa} kPa is not below the inlet at {totalPressureKPa} kPa.',
    fr: 'La sortie à {outletPressureKPa} kPa n’est pas sous l’entrée à {totalPressureKPa} kPa.',
  },
  'width-above-length': {
    en: 'The width {widthMm} mm is above the length {lengthMm} mm.',
    fr: 'La largeur {widthMm} mm dépasse la longueur {lengthMm} mm.',
  },
  'direction-without-length': { en: 'A direction has no length.', fr: 'Une direction n’a pas de longueur.' },
  'no-primary-axis': {
    en: 'The blade axis is as near to one cube axis as to another: there is no secondary angle.',
    fr: 'L’axe de l’aube est aussi proche d’un axe du cube que d’un autre : pas d’angle secondaire.',
  },
  'no-buoyancy': {
    en: '{inLiquidG} g in the liquid is not below {inAirG} g in air.',
    fr: '{inLiquidG} g dans le liquide n’est pas sous {inAirG} g dans l’air.',
  },
  'air-denser-than-liquid': {
    en: 'The air cannot be denser than the liquid.',
    fr: 'L’air ne peut être plus dense que le liquide.',
  },
  'part-no-denser-than-air': { en: 'The part must be denser than air.', fr: 'La pièce doit être plus dense que l’air.' },
} as const satisfies SentenceCatalogue;
