import { LightingScreen } from '#src/features/lighting/components/lighting-screen.tsx'

export { LightingScreen as Component }
