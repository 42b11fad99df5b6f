/** From an element's spec to its law: one line a kind. */
import type { ActuatorSpec, ElementSpec } from '../network.ts';
import { bypassRegulatorLaw } from './bypass-regulator.ts';
import { camPathLaw } from './cam-path.ts';
import { checkLaw } from './check.ts';
import { compensatedEdgeLaw } from './compensated-edge.ts';
import { cushionLaw } from './cushion.ts';
import { customLaw } from './custom.ts';
import { gearDividerLaw } from './gear-divider.ts';
import { intensifierLaw } from './intensifier.ts';
import { laminarLaw } from './laminar.ts';
import type { Law } from './law.ts';
import { lineLaw } from './line.ts';
import { pathLaw } from './path.ts';
import { pilotedLaw } from './piloted.ts';
import { pumpLaw } from './pump.ts';
import { regulatorLaw } from './regulator.ts';
import { reliefLaw } from './relief.ts';
import { shuttleLaw } from './shuttle.ts';
import { spoolDividerLaw } from './spool-divider.ts';

export function lawOf(spec: ElementSpec, actuators: readonly ActuatorSpec[]): Law {
  switch (spec.type) {
    case 'path':
      return pathLaw(spec);
    case 'check':
      return checkLaw(spec);
    case 'laminar':
      return laminarLaw(spec);
    case 'piloted':
      return pilotedLaw(spec);
    case 'relief':
      return reliefLaw(spec);
    case 'regulator':
      return regulatorLaw(spec);
    case 'bypassRegulator':
      return bypassRegulatorLaw(spec);
    case 'compensatedEdge':
      return compensatedEdgeLaw(spec);
    case 'camPath':
      return camPathLaw(spec);
    case 'cushion': {
      const body = actuators[spec.actuator];
      return cushionLaw(spec, (spec.end === 'extended' ? body?.high : body?.low) ?? 0);
    }
    case 'pump':
      return pumpLaw(spec);
    case 'line':
      return lineLaw(spec);
    case 'gearDivider':
      return gearDividerLaw(spec);
    case 'spoolDivider':
      return spoolDividerLaw(spec);
    case 'intensifier':
      return intensifierLaw(spec);
    case 'shuttle':
      return shuttleLaw(spec);
    case 'custom':
      return customLaw(spec);
  }
}
