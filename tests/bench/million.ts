import postgres from 'postgres';

const SITES = 200;
const PLOTS = 10;
const DAYS = 25;

/**
 * A million results of other growers, written past every check for speed: 200 sites of 10 plots, each sampled on 25 days
 * for 20 analytes. Only for a throw-away database, as its superuser.
 */
export async function fillMillion(superuserUrl: string, person: string): Promise<number> {
  const sql = postgres(superuserUrl, { max: 1, onnotice: () => {} });
  try {
    await sql.begin(async (tx) => {
      await tx`set local session_replication_role = replica`;
      await tx`create temp table s on commit drop as select gen_random_uuid() as id from generate_series(1, ${SITES}::int)`;
      await tx`insert into site (id, name, warm_months) select id, 'Filler', array_fill(true, array[12]) from s`;
      await tx`create temp table p on commit drop as select s.id as site_id, gen_random_uuid() as id, n from s, generate_series(1, ${PLOTS}::int) n`;
      await tx`insert into plot (site_id, id, name, outline) select site_id, id, 'Plot ' || n, '[[0,0],[9,0],[9,9],[0,9]]'::jsonb from p`;
      await tx`create temp table b on commit drop as
        select p.site_id, p.id as plot_id, gen_random_uuid() as id, gen_random_uuid() as report_id, gen_random_uuid() as line_id,
               date '2010-04-10' + (d * 211) as taken_on
        from p, generate_series(0, ${DAYS - 1}::int) d`;
      await tx`insert into sample (site_id, id, plot_id, taken_on) select site_id, id, plot_id, taken_on from b`;
      await tx`insert into report (site_id, id, origin, state, uploaded_by) select site_id, report_id, 'typed', 'confirmed', ${person} from b`;
      await tx`insert into report_sample (site_id, id, report_id, ordinal, plot_id, sample_id) select site_id, line_id, report_id, 1, plot_id, id from b`;
      await tx`insert into result (site_id, sample_id, report_id, report_sample_id, plot_id, taken_on, analyte, method, unit, unit_basis, value, qualifier, printed, confirmed_by)
        select b.site_id, b.id, b.report_id, b.line_id, b.plot_id, b.taken_on, a.key, 'Mehlich_3', 'mg/kg', 'mass', round((random() * 200)::numeric, 1), '=', '100', ${person}
        from b, unnest(array['soil_ph_water','buffer_ph','organic_matter','cec','phosphorus','potassium','calcium','magnesium','sulfur','sodium','boron','zinc','manganese','copper','iron','nitrate_n','ec','soil_ph_salt','base_saturation_k','base_saturation_ca']) as a(key)`;
    });
    await sql`analyze`;
    const [row] = await sql<{ count: number }[]>`select count(*)::int as count from result`;
    return row?.count ?? 0;
  } finally {
    await sql.end();
  }
}
