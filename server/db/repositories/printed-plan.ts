import type { PrintedPlan } from '../../print/plan-lines.ts'
import type { Db } from '../database.ts'

/** A sheet that can be printed again: its code, its layout and what the plan knows. */
export interface PlannedSheet {
  code: string
  layoutKey: string
  layoutVersion: number
  demonstratorId: string
  plan: PrintedPlan
}

/** The sheets of a demonstration in the order they are used, or one sheet by its id. */
export async function listPlannedSheets(
  db: Db,
  which: { demonstrationId: string } | { sheetId: string },
): Promise<PlannedSheet[]> {
  const [column, id] = 'sheetId' in which ? ['s.id', which.sheetId] : ['d.id', which.demonstrationId]
  return db.query(
    `SELECT s.code, s.layout_key AS "layoutKey", s.layout_version AS "layoutVersion", d.demonstrator_id AS "demonstratorId",
       json_build_object('heldOn', d.held_on, 'run', r.number, 'runs', (SELECT count(*) FROM runs o WHERE o.trial_id = t.id),
         'place', json_build_object('number', p.number, 'name', p.name), 'farmer', f.name, 'plot', t.plot,
         'tractor', json_build_object('number', tr.number, 'name', tr.name, 'ratedPower_kw', tr.rated_power_kw,
           'ratedRpm', tr.rated_rpm, 'drive', tr.drive, 'tyreFront', tr.tyre_front, 'tyreRear', tr.tyre_rear),
         'implement', json_build_object('number', i.number, 'name', i.name, 'ratedWidth_m', i.rated_width_m),
         'kit', json_build_object('number', k.number, 'jarCapacity_ml', k.jar_capacity_ml, 'jugCapacity_ml', k.jug_capacity_ml,
           'tapeSerial', k.tape_serial, 'gaugeSerial', k.gauge_serial),
         'demonstrator', json_build_object('number', u.number, 'name', u.name), 'driver', d.driver) AS plan
     FROM sheets s JOIN runs r ON r.id = s.run_id JOIN trials t ON t.id = r.trial_id
       JOIN demonstrations d ON d.id = t.demonstration_id JOIN places p ON p.id = d.place_id JOIN users u ON u.id = d.demonstrator_id
       JOIN tractors tr ON tr.id = t.tractor_id JOIN implements i ON i.id = t.implement_id JOIN kits k ON k.id = t.kit_id
       LEFT JOIN farmers f ON f.id = d.farmer_id
     WHERE ${column} = $1 AND s.planned AND s.code IS NOT NULL ORDER BY t.position, r.number, s.created_at`,
    [id],
  )
}
