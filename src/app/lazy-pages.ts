/** Pages whose code comes only when somebody opens them. */
export const LAZY_PAGES = {
  signIn: { Component: async () => (await import('./routes/sign-in-page.tsx')).SignInPage },
  fleet: { Component: async () => (await import('./routes/fleet-page.tsx')).FleetPage },
  pump: { Component: async () => (await import('./routes/pump-page.tsx')).PumpPage },
  alarms: { Component: async () => (await import('./routes/alarms-page.tsx')).AlarmsPage },
  alarm: { Component: async () => (await import('./routes/alarm-page.tsx')).AlarmPage },
  alarmHealth: { Component: async () => (await import('./routes/alarm-health-page.tsx')).AlarmHealthPage },
  energy: { Component: async () => (await import('./routes/energy-page.tsx')).EnergyPage },
  padEnergy: { Component: async () => (await import('./routes/pad-energy-page.tsx')).PadEnergyPage },
  tariffs: { Component: async () => (await import('./routes/tariffs-page.tsx')).TariffsPage },
  tariff: { Component: async () => (await import('./routes/tariff-page.tsx')).TariffPage },
  rules: { Component: async () => (await import('./routes/rules-page.tsx')).RulesPage },
  myPump: { Component: async () => (await import('./routes/my-pump-page.tsx')).MyPumpPage },
  profile: { Component: async () => (await import('./routes/profile-page.tsx')).ProfilePage },
} as const;
