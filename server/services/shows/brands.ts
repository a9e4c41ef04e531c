import type { Database } from '#server/models/database';
import type { Brand } from '#shared/api/shows';
import { Fault, notFound } from '../fault';
import { newId } from '../tokens';

interface BrandFacts {
  name: string;
  palette: string[];
  markAssetId: string | null;
}

const answerOf = ({ id, name, palette, markAssetId }: Brand): Brand => ({ id, name, palette, markAssetId });

async function find(db: Database, crewId: string, id: string) {
  const row = await db.brands.findOne({ where: { id, crewId } });
  if (!row) throw notFound('brand');
  return row;
}

async function refuseForeign(db: Database, crewId: string, { markAssetId }: BrandFacts): Promise<void> {
  if (markAssetId && !(await db.assets.findOne({ where: { id: markAssetId, crewId } })))
    throw new Fault(422, 'The mark is not in the Library.', 'Choose another file.', [
      { path: 'markAssetId', message: 'Not in the Library.' },
    ]);
}

export async function listBrands(db: Database, crewId: string): Promise<Brand[]> {
  const rows = await db.brands.findAll({ where: { crewId }, order: [['name', 'ASC']] });
  return rows.map(answerOf);
}

export async function makeBrand(db: Database, crewId: string, facts: BrandFacts): Promise<Brand> {
  await refuseForeign(db, crewId, facts);
  return answerOf(await db.brands.create({ id: newId(), crewId, ...facts }));
}

export async function editBrand(db: Database, crewId: string, id: string, facts: BrandFacts): Promise<Brand> {
  await refuseForeign(db, crewId, facts);
  return answerOf(await (await find(db, crewId, id)).update(facts));
}

export const readBrand = async (db: Database, crewId: string, id: string): Promise<Brand> =>
  answerOf(await find(db, crewId, id));

/** @throws Fault 409 while a show has it: past nights keep the brand they were played for */
export async function deleteBrand(db: Database, crewId: string, id: string): Promise<void> {
  const row = await find(db, crewId, id);
  const show = await db.shows.findOne({ where: { brandId: id } });
  if (show) throw new Fault(409, `“${show.name}” has this brand.`, 'Give that show another brand first.');
  await row.destroy();
}
