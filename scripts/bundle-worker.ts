/** Works on bundles once, in a process that may be killed: started by the trial with the environment of its stack. */
const { workOnBundles } = await import("~/services/bundle/work.server");
const { pool } = await import("~/db/client.server");
await workOnBundles();
await pool.end();
