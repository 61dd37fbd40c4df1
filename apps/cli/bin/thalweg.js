#!/usr/bin/env node
import '../dist/thalweg.js';
