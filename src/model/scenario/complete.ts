import { channelDefaults } from './modelDefaults.ts'
import { type ProfileName, profileForms, profileQuantities } from './profileQuantities.ts'
import type { ScenarioDocument } from './schema.ts'
import { validate } from './validate.ts'

type Channel = ScenarioDocument['channels'][number]

/**
 * The document with every default filled in. Completing a complete document changes nothing.
 * Throws a ScenarioError when a key or a value is not allowed.
 */
export function complete(document: unknown): ScenarioDocument {
  // A copy of its own: what the caller changes must not reach the defaults.
  const filled = structuredClone(validate(document))
  for (const name of Object.keys(profileQuantities) as ProfileName[]) {
    const profile = filled[name]
    if (profileForms.some((form) => profile[form] !== undefined)) continue
    const knots = structuredClone(profileQuantities[name].knots.value)
    Object.assign(filled, { [name]: { knots, ...profile } })
  }
  return { ...filled, channels: filled.channels.map(withAngles) }
}

function withAngles(channel: Channel): Channel {
  if (channel.geometry === 'backscatter') return channel
  return {
    ...channel,
    scattering_angle_deg:
      channel.scattering_angle_deg ?? channelDefaults.scattering_angle_deg.value,
    view_zenith_deg: channel.view_zenith_deg ?? channelDefaults.view_zenith_deg.value,
  }
}
