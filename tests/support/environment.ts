/** What tests of the server need of the environment; to be imported before anything that reads it. */
process.env.NEXTAUTH_SECRET = 'a secret that only the tests know, 40 chars'
process.env.LOG_LEVEL = 'silent'
