// The test runner puts its own meaning into BASE_URL; the app's code asks for the server's address there.
process.env.BASE_URL = process.env.SWALE_URL || "http://localhost:3000";
