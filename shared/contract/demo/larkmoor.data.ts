import type { DemoCompany } from './demo-company.ts';
import { LARKMOOR_COAST_PADS } from './larkmoor-coast.data.ts';
import { LARKMOOR_CUSTOMERS } from './larkmoor-customers.data.ts';
import { larkmoorEnergy } from './larkmoor-energy.data.ts';
import { LARKMOOR_MOTOR_MODELS, LARKMOOR_WET_END_MODELS } from './larkmoor-models.data.ts';
import { LARKMOOR_NORTH_PADS } from './larkmoor-north.data.ts';
import { LARKMOOR_SOUTH_PADS } from './larkmoor-south.data.ts';

const PADS = [...LARKMOOR_NORTH_PADS, ...LARKMOOR_COAST_PADS, ...LARKMOOR_SOUTH_PADS];

/** The invented company of the demo: 36 pumps on 30 pads, three routes. Nobody and nothing in it exists. */
export const LARKMOOR: DemoCompany = {
  name: 'Larkmoor Pool Care',
  zone: 'America/Los_Angeles',
  people: [
    { email: 'manager@larkmoor.example', name: 'Ilse Ravn', role: 'manager', phone: '+1 555 555 0101' },
    { email: 'tech@larkmoor.example', name: 'Joss Aldane', role: 'technician', phone: '+1 555 555 0102' },
    { email: 'coast@larkmoor.example', name: 'Mirren Tolvey', role: 'technician', phone: '+1 555 555 0103' },
    { email: 'south@larkmoor.example', name: 'Desmond Okarra', role: 'technician', phone: '+1 555 555 0104' },
    {
      email: 'home@larkmoor.example',
      name: 'Nell Haverlock',
      role: 'homeowner',
      phone: '+1 555 555 0105',
      customer: 'haverlock',
    },
  ],
  routes: [
    { area: 'North', technician: 'tech@larkmoor.example' },
    { area: 'Coast', technician: 'coast@larkmoor.example' },
    { area: 'South', technician: 'south@larkmoor.example' },
  ],
  customers: LARKMOOR_CUSTOMERS,
  motorModels: LARKMOOR_MOTOR_MODELS,
  wetEndModels: LARKMOOR_WET_END_MODELS,
  pads: PADS,
  energy: larkmoorEnergy(PADS),
};
