import type { Knex } from "knex";

/** The words of each notebook, so that the shelf can be searched for what stands in them. */
export async function up(knex: Knex): Promise<void> {
  await knex.raw("alter table notebooks add column search_text text not null default ''");
  // What has been deleted is looked through for what is due to go, and for what can still be brought back.
  await knex.raw("create index notebooks_deleted on notebooks (deleted_at) where deleted_at is not null");
}

export async function down(knex: Knex): Promise<void> {
  await knex.raw("drop index notebooks_deleted");
  await knex.raw("alter table notebooks drop column search_text");
}
